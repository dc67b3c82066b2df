import { EMC_MAX_PCT, EMC_TEMPERATURE_MAX_C, EMC_TEMPERATURE_MIN_C } from '@/lib/wood/emc'
import { EMC_PARAMETERS } from '@/lib/wood/emc-equation'
import { exactly } from '@/lib/method/figure'
import { type FormulaFacts, polynomial } from '../formula-facts'

const { W, K, K1, K2, scale } = EMC_PARAMETERS
const RANGE = `${exactly(EMC_TEMPERATURE_MIN_C)} to ${exactly(EMC_TEMPERATURE_MAX_C)} °C and 0 to 100 % RH; flagged below 0 °C, under 5 % and over 95 % RH`

export const emcFormulas: readonly FormulaFacts[] = [
  {
    id: 'emc-equation',
    title: 'Where wood ends',
    plain:
      'Wood left in one air for long enough ends at one moisture content. It hangs on the humidity almost alone; warmth lowers it a little.',
    lines: [
      `"EMC" = {${exactly(scale)}}/{W} [{K h}/{1 − K h} + {K_1 K h + 2 K_1 K_2 K^2 h^2}/{1 + K_1 K h + K_1 K_2 K^2 h^2}]`,
      `W = ${polynomial(W, 'T')}`,
      `K = ${polynomial(K, 'T')}`,
      `K_1 = ${polynomial(K1, 'T')}`,
      `K_2 = ${polynomial(K2, 'T')}`,
    ],
    letters: 'EMC in % of oven-dry mass, T in °C, h the relative humidity from 0 to 1.',
    source:
      'Wood Handbook (Ross ed., USDA Forest Products Laboratory, FPL-GTR-190, 2010), ch. 4, Eq. 4-5 (p. 4-3), after Simpson, Forest Products Journal 23(5), 1973',
    status: 'confirmed',
    range: `${RANGE}. Below 0 °C the figure for 0 °C stands`,
    limits: `One average curve for all woods, near the drying branch. Wood that takes up water after having been drier ends up to 15 % of the figure lower; oily dense woods lie lower too, which is said beside them and never hides a warning. Never more than ${exactly(EMC_MAX_PCT)} % MC`,
    doubt: '± 1 % MC as a figure; a difference between two rooms is better known',
  },
  {
    id: 'emc-inverse',
    title: 'The air that holds wood where you want it',
    plain: 'The same read backwards: the one humidity at which wood would settle at a moisture content.',
    lines: ['"EMC" (T, h) = M', '0 ≤ h ≤ 1'],
    letters: 'M the moisture content wanted, % MC. Found by halving, to a billionth of a percent.',
    source: 'Inverse of Eq. 4-5',
    status: 'derived',
    range: `${exactly(EMC_TEMPERATURE_MIN_C)} to ${exactly(EMC_TEMPERATURE_MAX_C)} °C; none where even saturated air holds less, and then it says so`,
    limits: 'As the equation itself',
    doubt: 'About 5 % RH near 50 % RH for ± 1 % MC',
  },
  {
    id: 'emc-doubt',
    title: 'What a sensor leaves open',
    plain:
      'A sensor that may be a little out gives a moisture content that may be a little out, the more so the damper the air.',
    lines: ['u^2 = ({∂ "EMC"}/{∂ H} u_H)^2 + ({∂ "EMC"}/{∂ T} u_T)^2'],
    letters:
      'H in % RH; u_H and u_T what the sensor may be out. The slope by H is the equation’s own, that by T a half-degree step.',
    source: 'JCGM 100:2008, 5.1.2, on Eq. 4-5',
    status: 'derived',
    range: 'As the equation itself',
    limits:
      'Covers the sensor only: not where it hangs, nor the curve. A sensor 1 K from the air that matters is about 3 % RH out',
    doubt:
      'Data sheets say ± 2 to 3 % RH and ± 0.3 K (from memory); sensors drift upward after long time over 80 % RH (from memory)',
  },
]
