import { DENSITY_FROM_MEMORY, OILY_SPECIES, SPECIES_NOTES } from './species-notes'
import { SPECIES_SOURCES, SPECIES_TABLE, type SpeciesRow } from './species-table'

export type MovementClass = 'small' | 'medium' | 'large'

/** How the figures were come by: `read` was seen in the named source, the rest say what is lacking. */
export type SpeciesStatus =
  'read' | 'mixed' | 'secondary' | 'from memory' | 'none found' | 'read (no shrinkage published)'

export type Species = {
  /** Latin name in lower case with hyphens: the wood's name in addresses. */
  readonly slug: string
  readonly commonName: string
  readonly latinName: string
  /** At 12 % MC; absent where none was found. */
  readonly densityKgM3?: number
  /** How the density was come by, where there is one; often worse known than the movement. */
  readonly densityStatus?: SpeciesStatus
  /** Fraction per % MC; absent where no shrinkage is published. */
  readonly radialPerPct?: number
  readonly tangentialPerPct?: number
  readonly movementClass: MovementClass
  readonly status: SpeciesStatus
  readonly source: string
  readonly note?: string
  readonly oily: boolean
}

export const speciesSlug = (latinName: string): string =>
  latinName
    .toLowerCase()
    .replaceAll(/[^a-z]+/g, '-')
    .replace(/-$/, '')

function speciesOfRow(row: SpeciesRow): Species {
  const [commonName, latinName, densityKgM3, radialPerPct, tangentialPerPct, movementClass, status, source] =
    row
  const slug = speciesSlug(latinName)
  const note = SPECIES_NOTES[slug]
  return {
    slug,
    commonName,
    latinName,
    ...(densityKgM3 === null
      ? {}
      : { densityKgM3, densityStatus: DENSITY_FROM_MEMORY.has(slug) ? ('from memory' as const) : status }),
    ...(radialPerPct === null || tangentialPerPct === null ? {} : { radialPerPct, tangentialPerPct }),
    movementClass,
    status,
    source: SPECIES_SOURCES[source],
    ...(note === undefined ? {} : { note }),
    oily: OILY_SPECIES.has(slug),
  }
}

/** Every wood that has a row, by common name. */
export const SPECIES: readonly Species[] = SPECIES_TABLE.map(speciesOfRow).sort((a, b) =>
  a.commonName.localeCompare(b.commonName, 'en'),
)

const BY_SLUG: ReadonlyMap<string, Species> = new Map(SPECIES.map((species) => [species.slug, species]))

/** The wood of that slug, or undefined for one without a row here. */
export function findSpecies(slug: string): Species | undefined {
  return BY_SLUG.get(slug)
}
