import {
  ACTIVATION_FALL_J_PER_MOL_PCT,
  ACTIVATION_J_PER_MOL,
  BOUND_WATER_M2_PER_S,
  CELL_GEOMETRY_AT_DRY,
  CELL_GEOMETRY_PER_PCT,
  DENSITY_MAX_KG_M3,
  DENSITY_MIN_KG_M3,
  DENSITY_TO_GRAVITY_KG_M3,
  GAS_CONSTANT_J_PER_MOL_K,
  LONGITUDINAL_RATIO,
  MC_CAP_PCT,
  SURFACE_M_PER_S,
} from '@/lib/carry/diffusion'
import { COUNTED_SHARE } from '@/lib/follow/finish'
import { RUNG_RATIO, RUNGS } from '@/lib/follow/exponentials'
import { DIFFUSION_TOWARDS_AIR } from '@/lib/follow/wood-state'
import { exactly, figure, percent } from '@/lib/method/figure'
import { mostOverPromisedPct } from '@/lib/method/film-effectiveness'
import { type FormulaFacts, powerOfTen } from '../formula-facts'

const CRANK = 'Crank, The Mathematics of Diffusion (1975)'

export const followingFormulas: readonly FormulaFacts[] = [
  {
    id: 'diffusion',
    title: 'How fast moisture goes through wood',
    plain: 'Faster in warm, damp and light wood, slower in cold, dry and dense wood.',
    lines: [
      'D_T = {D_B}/{(1 − a^2) (1 − a)}',
      `D_B = ${powerOfTen(BOUND_WATER_M2_PER_S)} exp(− {${exactly(ACTIVATION_J_PER_MOL)} − ${exactly(ACTIVATION_FALL_J_PER_MOL_PCT)} M}/{${exactly(GAS_CONSTANT_J_PER_MOL_K)} K})`,
      `a^2 = 1 − {ρ}/{${exactly(DENSITY_TO_GRAVITY_KG_M3)}} (${exactly(CELL_GEOMETRY_AT_DRY)} + ${exactly(CELL_GEOMETRY_PER_PCT)} M)`,
      `D_L = ${exactly(LONGITUDINAL_RATIO)} D_T`,
    ],
    letters: `D_T across the grain and D_L along it, m²/s; ρ the density at 12 % MC, kg/m³; K in kelvin; M no more than ${exactly(MC_CAP_PCT)} % MC.`,
    source: 'Siau, Transport Processes in Wood (1984)',
    status: 'from memory',
    range: `−10 to 50 °C, 0 to 30 % MC, ${exactly(DENSITY_MIN_KG_M3)} to ${exactly(DENSITY_MAX_KG_M3)} kg/m³`,
    limits:
      'Resistance of the cell cavities left out: high by under 1 % at 10 % MC, up to 5 % at 18 %. Measured spruce and aspen lie within its doubt',
    doubt: 'A factor of 2 either way; along the grain the ratio is reported from 2 to over 50',
  },
  {
    id: 'surface',
    title: 'The air’s grip on the surface',
    plain:
      'In still air a thin skin of air holds things up a little. Against a wall of wood it hardly matters.',
    lines: [`S = ${powerOfTen(SURFACE_M_PER_S)} "m/s"`, '"Bi" = {S L}/{D}', '"Fo" = {D t}/{L^2}'],
    letters: 'L the depth: half the wall with both faces open, all of it with one. Bi and Fo have no unit.',
    source: 'Derived: mass transfer times saturation density times slope of the isotherm over dry density',
    status: 'derived',
    range: '8 to 20 °C, 450 to 1200 kg/m³',
    limits: 'Nearly still air',
    doubt: '1.2 to 9 × 10⁻⁷ m/s',
  },
  {
    id: 'step',
    title: 'What a piece has followed of a step',
    plain:
      'When the air jumps, the wood follows quickly at first, then ever more slowly. The share followed is a sum of dying terms.',
    lines: [
      'E = 1 − ∑_n w_n exp(− b_n^2 "Fo")',
      '"slab:" b tan b = "Bi" , w = {2 "Bi"^2}/{b^2 (b^2 + "Bi"^2 + "Bi")}',
      '"cylinder:" b J_1 (b) = "Bi" J_0 (b) , w = {4 "Bi"^2}/{b^2 (b^2 + "Bi"^2)}',
    ],
    letters:
      'E from 0 to 1; J_0 and J_1 Bessel functions. A wall is a slab, a blank in the round a cylinder. The terms left over are closed by one that keeps the sum and the area under it exact.',
    source: `${CRANK}, ch. 4 and 5; the closing term derived`,
    status: 'confirmed',
    range: 'Every Bi above 0, and a surface that follows at once',
    limits:
      'A hollow cylinder’s wall counts as a slab (error under 0.002). Diffusion held constant within a step',
    doubt: 'Within 0.0001 of the whole series; all else is in D and S',
  },
  {
    id: 'ladder',
    title: 'The ladder that is kept with each piece',
    plain:
      'Real air never stops jumping. So each part of a piece keeps a few moisture contents that lag the air at paces of their own; their weighted mean is the part’s. Hour by hour they are moved on, never replayed from the start.',
    lines: [
      'τ = ∫ D dt',
      'm_i ← u + (m_i − u) exp(− λ_i Δ τ)',
      `λ_{i + 1} = ${exactly(RUNG_RATIO)} λ_i`,
      'M = ∑_i w_i m_i',
      '∑_i w_i = 1 , w_i ≥ 0',
    ],
    letters: `m_i the ${exactly(RUNGS)} rungs, u the EMC of the air or of the cover, λ_1 the slowest rate of the part when closed at rest. The weights w_i are fitted to the step of the part under each cover; another cover weighs the same rungs anew.`,
    source:
      'Derived; least squares without negative weights after Lawson and Hanson, Solving Least Squares Problems (1974), ch. 23 (from memory)',
    status: 'derived',
    range: 'Any step of time; exact for air that holds still within it',
    limits: 'Never overshoots. Bi is taken at 10 °C and 11 % MC, where it hardly changes',
    doubt: 'Within 0.008 of the series from the first hundredth on',
  },
  {
    id: 'diffusion-at',
    title: 'Where diffusion is taken',
    plain:
      'Diffusion changes as the wood takes up water. One value stands for a step: that of wood a little on the way to the air.',
    lines: [`M_D = M + ${exactly(DIFFUSION_TOWARDS_AIR)} (u − M)`],
    letters:
      'M the mean of ring and lid, u the EMC it meets. Temperature counts as it is, from −10 to 50 °C.',
    source: 'Derived, against a solver whose diffusion varies through the wall',
    status: 'derived',
    range: '0 to 30 % MC',
    limits: 'The parts share one diffusion: they are of one wood and seldom two points apart',
    doubt: 'Within 0.04 of the share followed',
  },
  {
    id: 'finish',
    title: 'What a finish does',
    plain:
      'A film slows moisture, it never stops it. It counts by half, only at rest, and cancels no warning.',
    lines: [
      `{1}/{S_e} = {1}/{S} + {${exactly(COUNTED_SHARE)}}/{S_f}`,
      '"MEE" = [1 − exp(z^2) erfc(z)] {√{π}}/{2 z}',
      'z = S_f √{{t}/{D}}',
    ],
    letters:
      'S_f what the film passes, found from its moisture-excluding effectiveness (MEE) after one day on pine.',
    source:
      'Wood Handbook (FPL-GTR-190, 2010), Table 16-3 (oil and varnish read; lacquer, shellac and epoxy at second hand); the second line derived',
    status: 'derived',
    range: 'Oil, lacquer, shellac, varnish, epoxy; wax and other words count as none',
    limits: `${percent(COUNTED_SHARE)} of the resistance counts. Handled, open, bagged or in the tub a piece counts as bare, and its rim always`,
    doubt: `A film that stays as it was promises up to ${figure(mostOverPromisedPct(7), 0)} points too much after a week, ${figure(mostOverPromisedPct(14), 0)} after two: see the tables`,
  },
]
