import { OUTCOME_LOG_SPREAD } from '@/lib/follow/learned-pace'
import { BAG_G_PER_M2_DAY, TUB_CHANGES_PER_H } from '@/lib/follow/cover-leak'
import { exactly } from '@/lib/method/figure'
import type { FormulaFacts } from '../formula-facts'

export const timeOutFormulas: readonly FormulaFacts[] = [
  {
    id: 'ring',
    title: 'The ring that binds',
    plain:
      'Not the whole box but the ring at the spigot: air gets in through its wall and through its end-grain rim at once.',
    lines: ['1 − E = [1 − E_s (D_T, w)] [1 − E_s (D_L, s)]'],
    letters:
      'E_s a slab; w the wall (half of it with both faces open), s the length of the spigot. Closed at rest, bagged or in the tub the rim is shielded and the second factor falls away. On a side-grain box the directions change places.',
    source: 'Derived from Crank, The Mathematics of Diffusion (1975), ch. 4 (product of two plane sheets)',
    status: 'derived',
    range: 'Open: both faces and rim. Lid on, handled: one face and rim. Closed: one face',
    limits: 'Same grip of the air on every face',
    doubt: 'A factor of 2 in time, and that of the end grain',
  },
  {
    id: 'lid',
    title: 'The lid',
    plain:
      'A plug is a disc with end grain above and below; a hollow lid is a ring of its own. It moves sooner or later than the ring.',
    lines: ['E = E_s (D_L, {d}/{2})'],
    letters:
      'd the thickness of the plug; all of it with one face open. A lid ahead of its base sits loose first on the way to damp, and grips on the way to dry.',
    source: 'Derived from Crank (1975), ch. 4',
    status: 'derived',
    range: 'Plug or hollow, lid over the base or dropped in',
    limits: 'The way in through the edge is left out: for a lid’s sizes it hardly counts',
    doubt: 'That of the end grain',
  },
  {
    id: 'loss',
    title: 'What the joint has lost',
    plain:
      'Ring and lid each stand some points from where they were cut. This is the clearance that is gone where the joint is tightest.',
    lines: ['L = D {C_T + C_R}/{2} (m_i − m_o) + D {|C_T − C_R|}/{2} (|m_i| + |m_o|)', 'U = {L}/{A}'],
    letters:
      'm the change of the inner part i and the outer part o, A the allowance, U the share of it that is used. The time out ends when U reaches 1.',
    source: 'Derived from the ovals of both parts, to first order',
    status: 'derived',
    range: 'Both parts 0 to 30 % MC',
    limits: 'Whichever way the lid is turned, so it is never told that a turn would save it',
    doubt: 'Drawn together with all else: see Doubt',
  },
  {
    id: 'cover',
    title: 'A bag or a tub',
    plain:
      'Wood in a closed cover holds the air in it at its own moisture, and drifts only by what leaks in.',
    lines: ['{dM}/{dt} = {100}/{m_d} [n V (a_o − a_i) + P A {p_o − p_i}/{p_r}]'],
    letters: `m_d the dry wood in it, V litres of a tub with n air changes an hour (${exactly(TUB_CHANGES_PER_H)}, and one more at each opening), a and p of the air outside and inside; P ${exactly(BAG_G_PER_M2_DAY)} g a day through a square metre A of bag at p_r = 392 Pa.`,
    source: 'Derived; the leaks are a guess',
    status: 'guess',
    range: '−10 to 50 °C; the isotherm taken as straight near 65 % RH',
    limits: 'Keeps a fit for a day, not for a season. A tub with a sensor in it is a room: its readings rule',
    doubt: 'Ten times less for a thick bag',
  },
  {
    id: 'pace',
    title: 'A site learns its pace',
    plain:
      'After each carry a maker says how the lid turned. From that the program learns one factor on diffusion for a site and a class of movement.',
    lines: ['p (f) ∝ p_0 (f) ∏_k ℓ (o_k, U (f))'],
    letters: `f the factor, p_0 its prior: 1, within a factor of 2 nine times in ten; o_k what was felt, U what the model had used up. What a hand feels spreads by ${exactly(OUTCOME_LOG_SPREAD)} in the logarithm; one outcome in fifty is taken for a slip.`,
    source: 'Bayes’ rule on a grid; the prior derived, what a hand feels a guess',
    status: 'derived',
    range: 'As before, tighter, binds; “looser” says nothing of the pace',
    limits: 'The doubt of the end grain is not learned and stays',
    doubt: 'Narrows with every outcome, and is used as it stands',
  },
]
