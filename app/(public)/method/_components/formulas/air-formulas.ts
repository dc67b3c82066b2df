import { DRY_AIR_HEAT_CAPACITY, VAPORISATION_HEAT_AT_ZERO, VAPOUR_HEAT_CAPACITY } from '@/lib/air/enthalpy'
import { STANDARD_PRESSURE_PA, VAPOUR_GAS_CONSTANT, WATER_TO_AIR_MASS_RATIO } from '@/lib/air/humidity'
import { MAGNUS_A, MAGNUS_B_C, MAGNUS_PA, OVER_ICE, OVER_WATER } from '@/lib/air/saturation'
import {
  ICE_HEAT_CAPACITY,
  SUBLIMATION_FALL,
  SUBLIMATION_HEAT_AT_ZERO,
  VAPORISATION_FALL,
  WATER_HEAT_CAPACITY,
} from '@/lib/air/wet-bulb'
import { exactly } from '@/lib/method/figure'
import { type FormulaFacts, polynomial, powerOfTen } from '../formula-facts'

const ASHRAE = 'ASHRAE Handbook, Fundamentals (2017), ch. 1'
const AIR_RANGE = '−40 to 60 °C, 0 to 100 % RH, at 101 325 Pa unless set'

const saturationLine = ([c0, c1, c2, c3, c4, c5, c6]: readonly number[]): string =>
  `ln p_s = − {${exactly(Math.abs(c0 ?? 0))}}/{K} ${polynomial([c1 ?? 0, c2 ?? 0, c3 ?? 0, c4 ?? 0, c5 ?? 0], 'K').replace(/^/, '+ ')} + ${powerOfTen(c6 ?? 0)} ln K`

export const airFormulas: readonly FormulaFacts[] = [
  {
    id: 'saturation',
    title: 'The most water that air can hold',
    plain:
      'Warm air can hold more water: about twice as much for each 11 °C. The first line holds over water, the second over ice.',
    lines: [saturationLine(OVER_WATER), saturationLine(OVER_ICE)],
    letters: 'p_s in Pa, K the temperature in kelvin (°C + 273.15).',
    source: `${ASHRAE}, eqs. 5 and 6 (Hyland and Wexler 1983)`,
    status: 'confirmed',
    range: '−100 to 200 °C',
    limits:
      'Tables count freezing air against ice, common sensors against water (WMO practice, from memory): what a sensor says is taken over water. It lies 5 % higher at −5 °C, 10 % at −10 °C',
    doubt: 'Within 0.022 % of the IAPWS equation over 5 to 50 °C',
  },
  {
    id: 'magnus',
    title: 'A short form for lines on charts',
    plain: 'Where a pixel is coarser than the difference, a shorter sum does.',
    lines: [`p_s = ${exactly(MAGNUS_PA)} exp({${exactly(MAGNUS_A)} T}/{${exactly(MAGNUS_B_C)} + T})`],
    letters: 'p_s in Pa, T in °C.',
    source: 'Magnus form, coefficients of the WMO Guide to Instruments (WMO-No. 8)',
    status: 'from memory',
    range: '−45 to 60 °C, for charts only',
    limits: 'Over water at every temperature',
    doubt: '−0.29 to +0.01 % from the full form over 0 to 50 °C',
  },
  {
    id: 'vapour',
    title: 'Vapour pressure and dew point',
    plain:
      'The water that is in the air, as a pressure; and the temperature at which it would begin to wet a surface.',
    lines: ['p_w = h p_s (T)', 'p_s (T_d) = p_w'],
    letters: 'h from 0 to 1, T_d the dew point, found by halving. Air without water has none.',
    source: `${ASHRAE}, eqs. 5, 6 and 12`,
    status: 'confirmed',
    range: AIR_RANGE,
    limits: 'Below freezing it is a frost point in tables, and counted over water from a sensor',
    doubt: 'The sensor’s; the sum agrees with psychrolib within 0.001 K',
  },
  {
    id: 'ratio',
    title: 'Humidity ratio and absolute humidity',
    plain: 'The mass of water for each kilogram of dry air, and in each cubic metre.',
    lines: [
      `w = ${exactly(WATER_TO_AIR_MASS_RATIO)} {p_w}/{p − p_w}`,
      `a = {1000 p_w}/{${exactly(VAPOUR_GAS_CONSTANT)} K}`,
    ],
    letters: `w in kg/kg, a in g/m³, p the pressure of the air, ${exactly(STANDARD_PRESSURE_PA)} Pa unless set.`,
    source: `${ASHRAE}, eq. 20; ideal gas law`,
    status: 'confirmed',
    range: AIR_RANGE,
    limits: 'Ideal gas',
    doubt: 'Within 0.7 % of the printed real gas',
  },
  {
    id: 'enthalpy',
    title: 'Heat in moist air',
    plain: 'How much heat the air holds, with that of its water.',
    lines: [
      `H = ${exactly(DRY_AIR_HEAT_CAPACITY)} T + w (${exactly(VAPORISATION_HEAT_AT_ZERO)} + ${exactly(VAPOUR_HEAT_CAPACITY)} T)`,
    ],
    letters: 'H in kJ for each kg of dry air.',
    source: `${ASHRAE}, eq. 30`,
    status: 'confirmed',
    range: AIR_RANGE,
    limits: 'Counted from dry air and liquid water at 0 °C',
    doubt: 'Within 1 % of the printed real gas',
  },
  {
    id: 'wet-bulb',
    title: 'Wet bulb',
    plain: 'What a thermometer in a wet wick in moving air would show. The second line is for a frozen wick.',
    lines: [
      `w = {(${exactly(VAPORISATION_HEAT_AT_ZERO)} − ${exactly(VAPORISATION_FALL)} T_w) w_s − ${exactly(DRY_AIR_HEAT_CAPACITY)} (T − T_w)}/{${exactly(VAPORISATION_HEAT_AT_ZERO)} + ${exactly(VAPOUR_HEAT_CAPACITY)} T − ${exactly(WATER_HEAT_CAPACITY)} T_w}`,
      `w = {(${exactly(SUBLIMATION_HEAT_AT_ZERO)} − ${exactly(SUBLIMATION_FALL)} T_w) w_s − ${exactly(DRY_AIR_HEAT_CAPACITY)} (T − T_w)}/{${exactly(SUBLIMATION_HEAT_AT_ZERO)} + ${exactly(VAPOUR_HEAT_CAPACITY)} T − ${exactly(ICE_HEAT_CAPACITY)} T_w}`,
    ],
    letters: 'T_w the wet bulb, w_s the humidity ratio saturated at it. Found by halving.',
    source: `${ASHRAE}, eqs. 33 and 35; the constants of the second line as the program has them`,
    status: 'confirmed',
    range: AIR_RANGE,
    limits: 'Where the wick freezes the two lines differ by about 0.5 K',
    doubt: 'Agrees with psychrolib within 0.001 K',
  },
  {
    id: 'warming',
    title: 'Warming air',
    plain: 'Warm air without adding water and its relative humidity falls, though nothing was taken out.',
    lines: ['h_2 = h_1 {p_s (T_1)}/{p_s (T_2)}'],
    letters: 'Before 1, after 2. Over 1 water condenses; it is not clipped.',
    source: `${ASHRAE}, eqs. 12 and 22`,
    status: 'derived',
    range: AIR_RANGE,
    limits:
      'Equal pressure. Walls and wood give up water as a room warms, so it ends damper than this until they have dried',
    doubt: 'Two points of RH before are 2 p_s (T_1) / p_s (T_2) points after',
  },
]
