import type { ResolvedWood, WoodStatus } from './site-wood'
import { findSpecies, type MovementClass } from './species'

export type ClassMovement = {
  /** Medians of the class, fraction per % MC. */
  readonly radialPerPct: number
  readonly tangentialPerPct: number
  /** The largest difference of the two in the class: what a warning counts with. */
  readonly differencePerPct: number
}

/** Movement of a wood of which only the class is known. Status: derived from the species table (medians, rounded). */
export const CLASS_MOVEMENT: Readonly<Record<MovementClass, ClassMovement>> = {
  small: { radialPerPct: 0.001, tangentialPerPct: 0.00165, differencePerPct: 0.0012 },
  medium: { radialPerPct: 0.0015, tangentialPerPct: 0.0028, differencePerPct: 0.0019 },
  large: { radialPerPct: 0.002, tangentialPerPct: 0.00365, differencePerPct: 0.0024 },
}

/** Where the wood is not known at all. Status: derived (medium class). */
export const UNKNOWN_WOOD_CLASS: MovementClass = 'medium'
/** Also where a wood's density is not known, kg/m³ at 12 % MC. Status: guess, a middling hardwood. */
export const UNKNOWN_DENSITY_KG_M3 = 650

/** How far a movement may be out, as a fraction. Within one species: from memory. Unknown wood: derived. */
export const SPECIES_MOVEMENT_DOUBT = 0.2
export const CLASS_MOVEMENT_DOUBT = 0.4

export type WoodMovement = {
  readonly radialPerPct: number
  readonly tangentialPerPct: number
  /** Tangential less radial: what makes a round joint oval. */
  readonly differencePerPct: number
  readonly densityKgM3: number
  /** Relative, ±: counts once, in the doubt. */
  readonly movementDoubt: number
  /** What was not known of this wood and was taken from its class or as a middling figure. */
  readonly assumed: readonly ('wood' | 'movement' | 'density')[]
  readonly status: WoodStatus | 'derived'
}

/** Keeps the mean movement of the class, and opens its two directions to the difference that a warning counts with. */
function movementForWarnings(
  movementClass: MovementClass,
): Pick<WoodMovement, 'radialPerPct' | 'tangentialPerPct' | 'differencePerPct'> {
  const { radialPerPct, tangentialPerPct, differencePerPct } = CLASS_MOVEMENT[movementClass]
  const mean = (radialPerPct + tangentialPerPct) / 2
  return {
    radialPerPct: mean - differencePerPct / 2,
    tangentialPerPct: mean + differencePerPct / 2,
    differencePerPct,
  }
}

/** What the movement of a wood is worked out from; a species of the table has all of it, and so has a site's own wood. */
export type WoodFigures = Pick<
  ResolvedWood,
  'radialPerPct' | 'tangentialPerPct' | 'densityKgM3' | 'movementClass' | 'status'
>

/**
 * What a wood does with moisture, with everything unknown filled in and named.
 * @param wood a species of the table, or a site's wood as `resolveWood` gives it; undefined counts as unknown
 * @returns fractions per % MC and density in kg/m³ at 12 % MC
 *
 * Source: the wood's own row (each names its own); else medians by class, status derived.
 */
export function movementOfWood(wood: WoodFigures | undefined): WoodMovement {
  if (wood === undefined) {
    return {
      ...movementForWarnings(UNKNOWN_WOOD_CLASS),
      densityKgM3: UNKNOWN_DENSITY_KG_M3,
      movementDoubt: CLASS_MOVEMENT_DOUBT,
      assumed: ['wood', 'movement', 'density'],
      status: 'derived',
    }
  }
  const { radialPerPct, tangentialPerPct, densityKgM3, movementClass, status } = wood
  const known = radialPerPct !== undefined && tangentialPerPct !== undefined
  return {
    ...(known
      ? { radialPerPct, tangentialPerPct, differencePerPct: tangentialPerPct - radialPerPct }
      : movementForWarnings(movementClass)),
    densityKgM3: densityKgM3 ?? UNKNOWN_DENSITY_KG_M3,
    movementDoubt: known ? SPECIES_MOVEMENT_DOUBT : CLASS_MOVEMENT_DOUBT,
    assumed: [
      ...(known ? [] : (['movement'] as const)),
      ...(densityKgM3 === undefined ? (['density'] as const) : []),
    ],
    status,
  }
}

/**
 * The same for a wood of the table by its name, where no site's own woods come in.
 * @param slug Latin name in lower case with hyphens; undefined or a wood without a row counts as unknown
 */
export const woodMovement = (slug: string | undefined): WoodMovement =>
  movementOfWood(slug === undefined ? undefined : findSpecies(slug))
