import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { cylinderRoots } from '@/lib/carry/bessel'
import { cylinderResponse } from '@/lib/carry/cylinder-response'
import {
  DENSITY_MAX_KG_M3,
  DENSITY_MIN_KG_M3,
  gravityOfDensity,
  LONGITUDINAL_RATIO,
  SURFACE_M_PER_S,
  transverseDiffusionM2PerS,
} from '@/lib/carry/diffusion'
import { EXPOSURE_OF_COVER } from '@/lib/carry/joint'
import { slabResponse, slabRoots } from '@/lib/carry/slab-response'
import type { Grain, PlaceCover } from '@/lib/pieces/piece'
import { type Left, ladderWeights } from './exponentials'

/** A part of a piece, as far as the way of moisture into it goes. */
export type PartShape =
  /** The wall at the spigot or round a recess, with its end-grain rim. */
  | { readonly kind: 'ring'; readonly wallMm: number; readonly lengthMm: number; readonly grain: Grain }
  /** A plug lid: end grain above and below, or side grain on a side-grain box. */
  | { readonly kind: 'disc'; readonly thicknessMm: number; readonly grain: Grain }
  /** The wall of a roughed blank, open on both faces whatever covers it. */
  | { readonly kind: 'wall'; readonly wallMm: number }
  /** A blank in the round. */
  | {
      readonly kind: 'solid'
      readonly diameterMm: number
      readonly lengthMm: number
      readonly endsSealed: boolean
    }

/** How a part follows the air, ready to be stepped: one ladder of rates, and for each cover what each rung weighs. */
export type PartFilter = {
  /** Basic specific gravity, for the diffusion. */
  readonly gravity: number
  /** 1/m² of diffusion time. */
  readonly slowestPerM2: number
  readonly weights: Readonly<Record<PlaceCover, Float64Array>>
}

/**
 * Where the ratio of surface to inner resistance is taken: 10 °C and 11 % MC. It hardly changes: between 8 and 20 °C the
 * surface passes 2.0 times as much and the wood 1.9 times (derived), so the ladder stays and only its time runs faster.
 */
const REFERENCE_C = 10
const REFERENCE_MC_PCT = 11
const MM_PER_M = 1000

type OneWay = { readonly left: Left; readonly slowestPerM2: number }

/** Through a thickness: `ratio` times as fast as across the grain. */
function throughSheet(depthMm: number, ratio: number, surfaceMPerS: number, acrossM2PerS: number): OneWay {
  assertFiniteAbove('depthMm', depthMm, 0)
  const depthM = depthMm / MM_PER_M
  const biot = (surfaceMPerS * depthM) / (ratio * acrossM2PerS)
  const response = slabResponse(biot)
  const perM2 = ratio / (depthM * depthM)
  return {
    left: (time) => 1 - response(perM2 * time),
    slowestPerM2: perM2 * (slabRoots(biot, 1)[0] ?? 0) ** 2,
  }
}

function throughSide(diameterMm: number, surfaceMPerS: number, acrossM2PerS: number): OneWay {
  assertFiniteAbove('diameterMm', diameterMm, 0)
  const radiusM = diameterMm / 2 / MM_PER_M
  const biot = (surfaceMPerS * radiusM) / acrossM2PerS
  const response = cylinderResponse(biot)
  const perM2 = 1 / (radiusM * radiusM)
  return {
    left: (time) => 1 - response(perM2 * time),
    slowestPerM2: perM2 * (cylinderRoots(biot, 1)[0] ?? 0) ** 2,
  }
}

/** Two ways in at once: what is left is the product. Source: Crank (1975), ch. 4 (product of solutions). */
const both = (one: OneWay, other: OneWay): OneWay => ({
  left: (time) => one.left(time) * other.left(time),
  slowestPerM2: one.slowestPerM2 + other.slowestPerM2,
})

/** The ways into a part under a cover. */
function waysIn(shape: PartShape, cover: PlaceCover, surfaceMPerS: number, acrossM2PerS: number): OneWay {
  const { faces, rim } = EXPOSURE_OF_COVER[cover]
  switch (shape.kind) {
    case 'ring': {
      const isEndGrain = shape.grain === 'end-grain'
      const wall = throughSheet(
        shape.wallMm / faces,
        isEndGrain ? 1 : LONGITUDINAL_RATIO,
        surfaceMPerS,
        acrossM2PerS,
      )
      if (rim === 'shielded') return wall
      // A finish stops short of the rim.
      return both(
        wall,
        throughSheet(shape.lengthMm, isEndGrain ? LONGITUDINAL_RATIO : 1, SURFACE_M_PER_S, acrossM2PerS),
      )
    }
    case 'disc':
      return throughSheet(
        shape.thicknessMm / faces,
        shape.grain === 'end-grain' ? LONGITUDINAL_RATIO : 1,
        surfaceMPerS,
        acrossM2PerS,
      )
    case 'wall':
      return throughSheet(shape.wallMm / 2, 1, surfaceMPerS, acrossM2PerS)
    case 'solid': {
      const side = throughSide(shape.diameterMm, surfaceMPerS, acrossM2PerS)
      if (shape.endsSealed) return side
      return both(side, throughSheet(shape.lengthMm / 2, LONGITUDINAL_RATIO, surfaceMPerS, acrossM2PerS))
    }
  }
}

const made = new Map<string, PartFilter>()
const MADE_MAX = 2000

/**
 * How a part follows the air under every cover.
 * @param shape sizes in mm, above 0
 * @param densityKgM3 at 12 % MC, 200 to 1400
 * @param restingSurfaceMPerS what the surface passes while the piece is at rest with its finish on, m/s; bare when left
 *   out. Handled, open, bagged or in the tub it counts as bare: a finish never cancels a warning.
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 4 and 5; joint of two ways derived. Good to a factor of two in
 * time, and along the grain to more than that.
 */
export function partFilter(
  shape: PartShape,
  densityKgM3: number,
  restingSurfaceMPerS: number = SURFACE_M_PER_S,
): PartFilter {
  assertInRange('densityKgM3', densityKgM3, DENSITY_MIN_KG_M3, DENSITY_MAX_KG_M3)
  assertFiniteAbove('restingSurfaceMPerS', restingSurfaceMPerS, 0)
  const key = `${JSON.stringify(shape)} ${String(densityKgM3)} ${String(restingSurfaceMPerS)}`
  const before = made.get(key)
  if (before !== undefined) return before
  if (made.size >= MADE_MAX) made.clear()
  const filter = newPartFilter(shape, densityKgM3, restingSurfaceMPerS)
  made.set(key, filter)
  return filter
}

function newPartFilter(shape: PartShape, densityKgM3: number, restingSurfaceMPerS: number): PartFilter {
  const acrossM2PerS = transverseDiffusionM2PerS(REFERENCE_C, REFERENCE_MC_PCT, densityKgM3)
  const ways = (cover: PlaceCover, surfaceMPerS: number) => waysIn(shape, cover, surfaceMPerS, acrossM2PerS)
  const atRest = ways('closed', restingSurfaceMPerS)
  const closed = ways('closed', SURFACE_M_PER_S)
  // Without a rim and with a finish a part is at its slowest: the ladder begins there.
  const slowestPerM2 = Math.min(atRest.slowestPerM2, closed.slowestPerM2)
  const weightsOf = (way: OneWay) => ladderWeights(way.left, slowestPerM2)
  const ofClosed = weightsOf(closed)
  return {
    gravity: gravityOfDensity(densityKgM3),
    slowestPerM2,
    weights: {
      open: weightsOf(ways('open', SURFACE_M_PER_S)),
      'lid-on': weightsOf(ways('lid-on', SURFACE_M_PER_S)),
      closed: atRest === closed ? ofClosed : weightsOf(atRest),
      bagged: ofClosed,
      tub: ofClosed,
    },
  }
}
