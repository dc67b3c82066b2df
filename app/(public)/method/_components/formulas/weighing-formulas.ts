import { ASSUMED_MC_PCT } from '@/lib/seasoning/drift'
import { METER_CALIBRATION_C, METER_DOUBT_PCT, TEMPERATURE_CORRECTION_PCT_PER_K } from '@/lib/seasoning/meter'
import { forecastBelowRateShare, sameWeightShare } from '@/lib/seasoning/policy'
import { LONGEST_TAU_OVER_RECORD } from '@/lib/seasoning/three-weighings'
import { exactly, figure, percent } from '@/lib/method/figure'
import type { FormulaFacts } from '../formula-facts'

const HANDBOOK = 'Wood Handbook (FPL-GTR-190, 2010)'

export const weighingFormulas: readonly FormulaFacts[] = [
  {
    id: 'moisture',
    title: 'Moisture content by weight',
    plain:
      'What the piece weighs beyond its dry self, as a share of that; and read backwards, what it will weigh.',
    lines: ['M = 100 {m − m_d}/{m_d}', 'm_d = {m}/{1 + M / 100}', 'm_t = m_d (1 + {M_t}/{100})'],
    letters: 'm as weighed, m_d oven-dry, m_t the weight at a target M_t.',
    source: `${HANDBOOK}, ch. 4, Eq. 4-1: what moisture content means`,
    status: 'from memory',
    range: '0 to 300 % MC',
    limits: 'Oil, wax, a cut or a label close a series: the dry mass is another one then',
    doubt: 'One point of a meter is about 0.9 % in the dry mass',
  },
  {
    id: 'meter',
    title: 'A meter, corrected',
    plain: 'Wood colder than the meter’s calibration reads low, so some is added; warmer, it is taken off.',
    lines: [`M = M_r + ${figure(TEMPERATURE_CORRECTION_PCT_PER_K, 4)} (T_c − T) + s`],
    letters: `M_r as read, T the wood’s temperature, T_c the calibration’s (${exactly(METER_CALIBRATION_C)} °C unless told, from memory), s what the meter’s own table adds for the wood.`,
    source: `${HANDBOOK}, p. 13-3 (0.5 % MC for each 5.6 K)`,
    status: 'read',
    range: 'Resistance 6 to 30 % MC, dielectric 4 to 30 %; flagged outside',
    limits: 'Over 30 % only a hint. Readings of one meter share its error',
    doubt: `± ${exactly(METER_DOUBT_PCT)} point for the average of several`,
  },
  {
    id: 'three',
    title: 'Where three weighings head',
    plain: 'From three weights an equal time apart, the weight that they die away to and how fast.',
    lines: [
      'W_∞ = W_3 − {(W_2 − W_3)^2}/{(W_1 − W_2) − (W_2 − W_3)}',
      'τ = {Δ t}/{ln {W_1 − W_2}/{W_2 − W_3}}',
    ],
    letters: 'W in g, Δt the time between two.',
    source: 'Derived: the exponential through three equally spaced points',
    status: 'derived',
    range: 'Each loss smaller than the one before, by more than the scale’s error',
    limits: `No end where the time constant is over ${exactly(LONGEST_TAU_OVER_RECORD)} times the record`,
    doubt:
      'Wood starts faster than an exponential: begun at 0.16, 0.25 or 0.36 of the way the end comes out 43, 17 or 7 % of the change too high, so it looks closer to done than it is',
  },
  {
    id: 'series',
    title: 'And more than three, in any spacing',
    plain:
      'The curve that lies closest to all weights; and beside it every curve that lies nearly as close, the fresh slab’s among them, which is the doubt.',
    lines: ['W = W_∞ + B exp(− {t}/{τ})', '∑ (W_k − W (t_k))^2 "least"'],
    letters: 'For a given τ the other two are a straight regression; τ is searched.',
    source: 'Derived; regression as in any textbook',
    status: 'derived',
    range: 'Three weights or more; no forecast until the loss has slowed to half',
    limits: `Half means ${percent(forecastBelowRateShare)} of the first rate. A room that drifts moves the end`,
    doubt: 'Middle 8 in 10 of all those curves; ready is told as a range, never a day',
  },
  {
    id: 'drift',
    title: 'Taking the room’s drift out of a weight',
    plain:
      'A blank that is done still gains in a damp autumn. What the room added is reckoned and taken away, so that only drying is left.',
    lines: ['{dδ}/{dt} = {u − u_r − δ}/{τ}', 'W_c = W − {m_d δ}/{100}'],
    letters:
      'δ points of % MC that the room has added, u its EMC, u_r the reference. Where the piece has a model, δ is the difference of two courses of it.',
    source: 'Derived',
    status: 'derived',
    range: 'Days with a record; a day without one counts as the reference',
    limits: `Not corrected where more than a quarter has no record. The dry mass is taken at ${exactly(ASSUMED_MC_PCT)} % MC where nothing is known`,
    doubt: 'A slab answers faster at first than a single lag',
  },
  {
    id: 'same',
    title: 'When weights count as the same',
    plain: 'Three weights over eight weeks, no further apart than the scale or the wood can tell.',
    lines: [`max W − min W ≤ max(s, ${exactly(sameWeightShare)} W)`],
    letters: 's one step of the scale.',
    source: 'Common practice',
    status: 'common practice, no source',
    range: 'Corrected weights; as weighed only where the maker lets weights alone decide',
    limits: 'Ready also takes the home’s MC and the two rests: see the thresholds',
    doubt: 'None is stated',
  },
]
