import { JOINT_DIAMETER_MAX_MM } from '@/lib/fit/ovality'
import { MOST_EXTRA_MM, STEP_MM, WIDEST_DOUBT_PCT } from '@/lib/fit/fit-check'
import { exactly, figure } from '@/lib/method/figure'
import type { FormulaFacts } from '../formula-facts'

const FROM_OVALS = 'Derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2, taken in both directions'
const JOINT_RANGE = `Joints up to ${exactly(JOINT_DIAMETER_MAX_MM)} mm, 30 points either way`
const UPPER_FIGURE =
  'Blank away from the pith, axis along the grain, rings nearly parallel across the joint; walls do not hold each other back. An upper figure'
const MOVEMENT_DOUBT = 'That of the wood’s movement: a lid is not known to better than 0.05 mm'

export const fitFormulas: readonly FormulaFacts[] = [
  {
    id: 'oval',
    title: 'A round joint becomes an oval',
    plain: 'Turned round, it grows more along the rings than across them, and so it is round no more.',
    lines: ['D_T = D (1 + C_T m)', 'D_R = D (1 + C_R m)', 'D_T − D_R = D (C_T − C_R) m'],
    letters:
      'm the points of % MC since it was cut. On a side-grain box the plane of the joint holds the direction along the grain: C_R gives way to that of the grain.',
    source: FROM_OVALS,
    status: 'derived',
    range: JOINT_RANGE,
    limits: UPPER_FIGURE,
    doubt: MOVEMENT_DOUBT,
  },
  {
    id: 'clearance',
    title: 'Least clearance, one wood that changed alike',
    plain:
      'With the grain lined up the two ovals lie in each other and nothing is lost. A quarter turn on they cross, and the most is lost. Swelling and drying lose the same.',
    lines: ['c (θ) = c − D |C_T − C_R| |m| |sin θ|'],
    letters:
      'c the difference of the two diameters as turned, θ the turn of the lid. Below 0 the lid may bind by that much.',
    source: FROM_OVALS,
    status: 'derived',
    range: JOINT_RANGE,
    limits: UPPER_FIGURE,
    doubt:
      'Within 0.007 mm of the ovals themselves up to 60 mm and 0.3 mm of clearance; else that of the movement',
  },
  {
    id: 'clearance-two',
    title: 'The same for two parts that differ',
    plain:
      'A base and a lid of other woods, or that have not followed the air alike. The middle term is what a part that lags takes at every angle.',
    lines: [
      'c (θ) = c + D (e_l − e_b) − D √{d_b^2 + d_l^2 − 2 d_b d_l cos 2 θ}',
      'e = {(C_T + C_R) m}/{2}',
      'd = {(C_T − C_R) m}/{2}',
    ],
    letters: 'b the part with the spigot, l the part over it. Where the lid drops in, the two change places.',
    source: FROM_OVALS,
    status: 'derived',
    range: JOINT_RANGE,
    limits: UPPER_FIGURE,
    doubt: 'Within 0.014 mm of the ovals up to 100 mm and 0.4 mm; else that of the movement',
  },
  {
    id: 'clearance-exact',
    title: 'From the ovals themselves',
    plain: 'The least difference, over all directions, of what a caliper would read on lid and base.',
    lines: ['w (φ) = √{a^2 cos^2 φ + b^2 sin^2 φ}', 'c (θ) = min_φ [w_l (φ − θ) − w_b (φ)]'],
    letters:
      'a and b the two diameters of an oval, w its width in direction φ. This is what the lid view draws.',
    source: 'Derived: widths of an ellipse. Both are convex and symmetric, so shifting the lid cannot help',
    status: 'derived',
    range: JOINT_RANGE,
    limits: UPPER_FIGURE,
    doubt: 'To 0.000001 mm as a sum; else that of the movement',
  },
  {
    id: 'allowed',
    title: 'How much change a fit stands',
    plain:
      'Solved for the change: how many points either way until a clearance, an allowance or a grade is gone.',
    lines: ['m = {c − c_k}/{D |C_T − C_R| |sin θ|}'],
    letters:
      'c_k the clearance to be kept. “Any angle” is a quarter turn. For a grade, c − c_k is what the grade may lose.',
    source: 'Derived from the line above',
    status: 'derived',
    range: JOINT_RANGE,
    limits: 'No limit where nothing is lost at that angle',
    doubt: 'That of the movement, and half of a grade’s figure either way (guess)',
  },
  {
    id: 'fit-check',
    title: 'Cut it, cut it easy, or let it rest',
    plain:
      'A joint cut now goes from the driest to the dampest of its home’s year. What it loses on the way must be no more than its grade may lose; what goes beyond can be left more; else let it rest.',
    lines: ['L = D |C_T − C_R| max(|M_h − M|, |M_l − M|)'],
    letters: `L what the year takes at a quarter turn, M where the wood is, M_h and M_l the ends of the year. Cut it while L is within the allowance; cut it easy while it is within ${figure(MOST_EXTRA_MM, 1)} mm more, in steps of ${figure(STEP_MM, 2)} mm.`,
    source: 'Derived; the grades’ figures are a guess',
    status: 'derived',
    range: '0 to 30 % MC; at least a month of the home’s or keep room’s air',
    limits: `Not judged where the wood is known no better than ± ${exactly(WIDEST_DOUBT_PCT)} point; wild grain, stabilised wood and threads get words only`,
    doubt: 'Root of the summed squares of the doubt of M and of the movement',
  },
  {
    id: 'hybrid',
    title: 'Part wood, part resin',
    plain:
      'Resin takes up next to no water, so only the plain part of a hybrid moves. Stabilised wood is not worked out to move.',
    lines: ['C = s C_p'],
    letters: 's the share of the joint’s diameter that is plain wood, C_p its movement.',
    source: 'Derived for wood and resin side by side; that resin stays as it is: common practice, no source',
    status: 'common practice, no source',
    range: '0 to 1; taken as 1, an upper figure, where it is not known',
    limits: 'No warp between the two',
    doubt: 'Not known',
  },
]
