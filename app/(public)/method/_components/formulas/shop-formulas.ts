import { AIR_HEAT_WH_PER_M3_K, LATENT_HEAT_MJ_PER_KG } from '@/lib/shop/heat'
import { heaterWaterKgPerKwh } from '@/lib/shop/heater'
import { warmestShopC } from '@/lib/shop/policy'
import { SURFACE_FACTOR } from '@/lib/shop/surface'
import { AIR_DENSITY_KG_M3 } from '@/lib/shop/water'
import { exactly, figure } from '@/lib/method/figure'
import type { FormulaFacts } from '../formula-facts'

export const shopFormulas: readonly FormulaFacts[] = [
  {
    id: 'warm-to',
    title: 'Warm it to, or dry it to',
    plain:
      'The temperature at which the same air suits wood at the moisture content wanted; or the humidity that does at the temperature it has.',
    lines: ['"EMC" (T_2, h_1 {p_s (T_1)}/{p_s (T_2)}) = M', '"EMC" (T_1, h_2) = M'],
    letters: 'M the moisture content wanted. Found by halving.',
    source: 'Wood Handbook (FPL-GTR-190, 2010), Eq. 4-5, with the vapour pressure held',
    status: 'derived',
    range: `Up to ${exactly(warmestShopC)} °C; beyond that warming is not the way`,
    limits:
      'No water added or taken away. Walls and wood give up water as a room warms; wood follows in days',
    doubt: '± 1 % MC of the curve',
  },
  {
    id: 'water',
    title: 'Water to take out',
    plain: 'From the air once, from the wood over weeks, and what each hour’s outdoor air brings in.',
    lines: [
      'm_a = {V (a_1 − a_2)}/{1000}',
      'm_w = {m_d (M_1 − M_2)}/{100}',
      `q = ${exactly(AIR_DENSITY_KG_M3)} n V (w_o − w_r)`,
    ],
    letters:
      'V in m³, a in g/m³, m_d the dry wood in kg, n air changes an hour, w outside and in the room, q in kg/h.',
    source: 'Ideal gas law; definition of moisture content; mass balance',
    status: 'derived',
    range: '−10 to 50 °C',
    limits: 'Walls are left out; wood holds far more than air',
    doubt: 'Told as “about”, two figures',
  },
  {
    id: 'heat',
    title: 'Heat to hold it warm',
    plain: 'For the air that leaves, and for walls, roof and floor, which often take more.',
    lines: [
      `P = ${figure(AIR_HEAT_WH_PER_M3_K, 3)} n V Δ T + G Δ T`,
      `Q = {${exactly(LATENT_HEAT_MJ_PER_KG)}}/{3.6} m`,
    ],
    letters:
      'P in W, ΔT warmer than outside, G the loss of the shell in W/K: asked for, never assumed. Q in kWh, bound in m kg of water.',
    source:
      'Heat balance with air at 1.2 kg/m³; latent heat from ASHRAE Handbook, Fundamentals (2017), ch. 1, rounded',
    status: 'derived',
    range: '0 to 80 K warmer',
    limits: 'Holds it warm. To warm it up takes more for the first hours or days',
    doubt: 'Told as “about”, two figures',
  },
  {
    id: 'heater',
    title: 'What a heater adds',
    plain: 'A flame without a flue puts its water, and carbon monoxide, into the room.',
    lines: [`w = w_o + {q_h}/{${exactly(AIR_DENSITY_KG_M3)} n V}`, 'h = {p_w (w)}/{p_s (T)}'],
    letters: `q_h the water of the heater, kg/h: ${figure(heaterWaterKgPerKwh('unflued'), 3)} for each kWh of an unflued propane heater, nothing for an electric or flued one.`,
    source: 'Mass balance; C₃H₈ + 5 O₂ → 3 CO₂ + 4 H₂O by molar masses; heat of propane from memory',
    status: 'derived',
    range: 'In the long run, with air from outside coming in',
    limits: 'Leaves out what wood and walls take up',
    doubt: 'Told as “about”',
  },
  {
    id: 'airing',
    title: 'Does outdoor air help',
    plain:
      'It dries the room only when it holds less water; what its relative humidity looks like says nothing.',
    lines: ['w_o < w_r'],
    letters:
      'Humidity ratio outside and in the room. Nothing is said where two usual sensors could not tell them apart.',
    source: 'ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 20, compared',
    status: 'derived',
    range: '−10 to 50 °C',
    limits: 'Ventilation for fumes and dust is never to be reduced for humidity',
    doubt: '± 3 % RH of each sensor',
  },
  {
    id: 'surface-humidity',
    title: 'Cold surfaces',
    plain:
      'Air that touches cold iron or a cold wall is cooled there: it may wet it, and rust or mould follow.',
    lines: [
      'h_s = h {p_s (T)}/{p_s (T_s)}',
      '"wet where" T_s ≤ T_d',
      `T_s = T − (1 − ${exactly(SURFACE_FACTOR)}) (T − T_o)`,
    ],
    letters: 'T_s of the surface, measured, or by the last line from the outdoor temperature T_o.',
    source: `ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 12; factor as in ISO 13788, ${exactly(SURFACE_FACTOR)} from memory; 80 % as in ASHRAE 160-2009`,
    status: 'derived',
    range: '−40 to 60 °C at the surface',
    limits: 'Covers walls. A lathe bed stays colder for hours after the room is warmed: measure it',
    doubt: 'About 1 K',
  },
]
