import { assertFiniteAbove } from '@/lib/assert'
import type { Grain, PlaceCover } from '@/lib/pieces/piece'
import { LONGITUDINAL_RATIO, SURFACE_M_PER_S, transverseDiffusionM2PerS } from './diffusion'
import { slabResponse } from './slab-response'

/** How the ring of a joint meets the air: faces of its wall that are open, and whether its rim is. */
export type Exposure = { readonly faces: 1 | 2; readonly rim: 'open' | 'shielded' }

/**
 * What each cover leaves open. A bag or a tub counts as a closed box at rest (the wood in it holds the air at its own
 * moisture content; status: derived).
 */
export const EXPOSURE_OF_COVER: Readonly<Record<PlaceCover, Exposure>> = {
  open: { faces: 2, rim: 'open' },
  'lid-on': { faces: 1, rim: 'open' },
  closed: { faces: 1, rim: 'shielded' },
  bagged: { faces: 1, rim: 'shielded' },
  tub: { faces: 1, rim: 'shielded' },
}

/** The ring that binds: wall and length at the spigot, and how the grain lies in it. */
export type RingSize = { readonly wallMm: number; readonly spigotMm: number; readonly grain: Grain }

/** Wood at the temperature and moisture content at which its diffusion is taken. */
export type WoodAt = { readonly densityKgM3: number; readonly temperatureC: number; readonly mcPct: number }

/** The fraction of a step of the air that a part has followed after some seconds. */
export type FractionChanged = (elapsedS: number) => number

const MM_PER_M = 1000

/** Seconds to fraction for one way into the wood: through `depthMm`, closed at its end or met by the other face. */
function throughSlab(diffusionM2PerS: number, depthMm: number): FractionChanged {
  const depthM = depthMm / MM_PER_M
  const response = slabResponse((SURFACE_M_PER_S * depthM) / diffusionM2PerS)
  const fourierPerS = diffusionM2PerS / (depthM * depthM)
  return (elapsedS) => response(fourierPerS * elapsedS)
}

/**
 * How the ring of a joint follows a step of the air.
 * @param size wall and length of the spigot in mm, above 0; for a side-grain box the directions change places
 * @param exposure how many faces of the wall are open (1 or 2), and whether the end-grain rim is
 * @param wood density in kg/m³ at 12 % MC, temperature in °C, moisture content in % MC
 * @returns the fraction changed, 0 to 1, against seconds since the step
 * @throws RangeError for an input out of range or NaN
 *
 * What is left is the product of what is left through the wall and through the rim. Good to a factor of two in time,
 * and the ratio along the grain to more than that.
 * Source: derived from Crank, The Mathematics of Diffusion (1975), ch. 4 (product of two plane sheets).
 */
export function ringFractionChanged(size: RingSize, exposure: Exposure, wood: WoodAt): FractionChanged {
  assertFiniteAbove('wallMm', size.wallMm, 0)
  assertFiniteAbove('spigotMm', size.spigotMm, 0)
  const acrossGrain = transverseDiffusionM2PerS(wood.temperatureC, wood.mcPct, wood.densityKgM3)
  const alongGrain = LONGITUDINAL_RATIO * acrossGrain
  const isEndGrain = size.grain === 'end-grain'
  const throughWall = throughSlab(isEndGrain ? acrossGrain : alongGrain, size.wallMm / exposure.faces)
  if (exposure.rim === 'shielded') return throughWall
  const throughRim = throughSlab(isEndGrain ? alongGrain : acrossGrain, size.spigotMm)
  return (elapsedS) => 1 - (1 - throughWall(elapsedS)) * (1 - throughRim(elapsedS))
}

/**
 * How a plug lid follows a step of the air: a disc with end grain above and below.
 * @param lidMm thickness of the disc, mm, above 0
 * @param faces how many of its faces are open: two in work, one with the lid on its box
 * @param wood density in kg/m³ at 12 % MC, temperature in °C, moisture content in % MC
 * @returns the fraction changed, 0 to 1, against seconds since the step
 * @throws RangeError for an input out of range or NaN
 *
 * The way in through the edge hardly counts for a lid's sizes and is left out.
 * Source: derived from Crank, The Mathematics of Diffusion (1975), ch. 4.
 */
export function plugLidFractionChanged(lidMm: number, faces: 1 | 2, wood: WoodAt): FractionChanged {
  assertFiniteAbove('lidMm', lidMm, 0)
  const acrossGrain = transverseDiffusionM2PerS(wood.temperatureC, wood.mcPct, wood.densityKgM3)
  return throughSlab(LONGITUDINAL_RATIO * acrossGrain, lidMm / faces)
}
