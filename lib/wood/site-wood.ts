import { z } from 'zod'
import { dustNote } from './dust'
import { protectedNote } from './protected'
import { findSpecies, type MovementClass, type Species, type SpeciesStatus, speciesSlug } from './species'
import { OILY_SPECIES } from './species-notes'

/** A site's own woods, and its own figures for woods of the table; and a wood as both the API and the pages show it. */

export const movementClassSchema = z.enum(['small', 'medium', 'large'])

const PER_PCT_MAX = 0.01
const perPct = z
  .number()
  .gt(0, 'above 0')
  .max(PER_PCT_MAX, 'at most 0.01 of the size for each point of % MC: is a decimal point missing?')

const facts = {
  commonName: z.string().trim().min(1, 'give it a name').max(60, '60 letters at most'),
  latinName: z
    .string()
    .trim()
    .max(80, '80 letters at most')
    .regex(/^[\p{L} .×/-]*$/u, 'letters, as in Fraxinus excelsior'),
  movementClass: movementClassSchema,
  /** Fraction of the size for each % MC, between 6 and 14 % MC; null where it isn't known. */
  radialPerPct: perPct.nullable(),
  tangentialPerPct: perPct.nullable(),
  densityKgM3: z.number().min(200, '200 to 1400 kg/m³').max(1400, '200 to 1400 kg/m³').nullable(),
  /** Where the figures come from. */
  source: z.string().trim().max(300, '300 letters at most'),
  note: z.string().trim().max(1000, '1000 letters at most'),
}

type Figures = { radialPerPct?: number | null; tangentialPerPct?: number | null }

/**
 * What is wrong with two figures of movement together; undefined when nothing is.
 * Both or neither, and along the rings at least as much as across: true of every wood in the table.
 */
export function wrongFigures({
  radialPerPct,
  tangentialPerPct,
}: Figures): { path: 'radialPerPct' | 'tangentialPerPct'; message: string } | undefined {
  const radial = radialPerPct ?? null
  const tangential = tangentialPerPct ?? null
  if (radial === null && tangential !== null)
    return { path: 'radialPerPct', message: 'give both directions, or neither' }
  if (tangential === null && radial !== null)
    return { path: 'tangentialPerPct', message: 'give both directions, or neither' }
  if (radial !== null && tangential !== null && tangential < radial)
    return {
      path: 'tangentialPerPct',
      message: 'wood moves more along the rings than across them: are the two swapped?',
    }
  return undefined
}

const checkFigures = (value: Figures, context: z.RefinementCtx) => {
  const wrong = wrongFigures(value)
  if (wrong !== undefined) context.addIssue({ code: 'custom', path: [wrong.path], message: wrong.message })
}

/**
 * A wood of the site's own, or with `overrides` its own figures for a wood of the table: what is left null then stays as
 * the table has it, names and all.
 */
export const newSiteWoodSchema = z
  .strictObject({
    /** Slug of the wood that the figures stand for. */
    overrides: z.string().max(60).nullable().default(null),
    commonName: facts.commonName.optional(),
    latinName: facts.latinName.optional(),
    /** Medium until told; of a wood of the table, its own class. */
    movementClass: facts.movementClass.optional(),
    radialPerPct: facts.radialPerPct.default(null),
    tangentialPerPct: facts.tangentialPerPct.default(null),
    densityKgM3: facts.densityKgM3.default(null),
    source: facts.source.default(''),
    note: facts.note.default(''),
  })
  .superRefine((wood, context) => {
    checkFigures(wood, context)
    const issue = (path: string, message: string) => {
      context.addIssue({ code: 'custom', path: [path], message })
    }
    if (wood.overrides === null && wood.commonName === undefined) issue('commonName', 'give it a name')
    if (wood.overrides !== null) {
      const name = (['commonName', 'latinName'] as const).find((one) => wood[one] !== undefined)
      if (name !== undefined) issue(name, 'a wood of the table keeps its name')
    }
  })
export type NewSiteWood = z.infer<typeof newSiteWoodSchema>

/** Names can be changed only of a wood of the site's own. */
export const siteWoodChangeSchema = z.strictObject(facts).partial()
export type SiteWoodChange = z.infer<typeof siteWoodChangeSchema>

/** Prefix of the public id of a wood that is a site's own; no Latin name is so. */
const OWN = 'own-'
export const ownWoodId = (code: string): string => OWN + code
/** The code in the public id of a site's own wood; undefined for a slug of the table. */
export const ownWoodCode = (id: string): string | undefined =>
  id.startsWith(OWN) ? id.slice(OWN.length) : undefined

/** What stands in an address for a wood: a slug of the table, or `own-` and a code. */
export const woodIdSchema = z.string().regex(/^[a-z0-9][a-z0-9-]{0,59}$/)

/** A row of the site's: its own wood, or its figures for one of the table. */
export type SiteWood = {
  readonly code: string
  /** Slug of the table's wood whose figures these replace; null for a wood of the site's own. */
  readonly overrides: string | null
  readonly commonName: string
  readonly latinName: string
  readonly movementClass: MovementClass
  /** Fraction per % MC; null where it isn't known. Both or neither. */
  readonly radialPerPct: number | null
  readonly tangentialPerPct: number | null
  /** At 12 % MC; null where it isn't known. */
  readonly densityKgM3: number | null
  readonly source: string
  readonly note: string
  readonly version: number
  readonly isArchived: boolean
}

/** `site`: the figures are the site's own. */
export type WoodStatus = SpeciesStatus | 'site'

/** A wood with the figures that count at a site. A species of the table is one as it stands. */
export type ResolvedWood = Omit<Species, 'status' | 'densityStatus'> & {
  readonly status: WoodStatus
  readonly densityStatus?: WoodStatus
}

/** Genera that are oily through and through, for woods without a row. Status: derived from the oily woods of the table. */
const OILY_GENERA: ReadonlySet<string> = new Set(['dalbergia', 'guaiacum'])

/** Whether a wood is one of the oily, dense ones, which follow the common curve less. */
export const isOilyWood = (latinSlug: string): boolean =>
  OILY_SPECIES.has(latinSlug) || OILY_GENERA.has(latinSlug.split('-')[0] ?? '')

const given = <K extends string, V>(name: K, value: V | null): { [P in K]?: V } =>
  value === null ? {} : ({ [name]: value } as { [P in K]?: V })

/**
 * A site's own wood as a wood to reckon with, under its public id.
 * Where it has no figures they are absent, and `movementOfWood` falls back to its class.
 */
export function resolvedOwnWood(wood: SiteWood): ResolvedWood {
  const { radialPerPct, tangentialPerPct, densityKgM3 } = wood
  return {
    slug: ownWoodId(wood.code),
    commonName: wood.commonName,
    latinName: wood.latinName,
    ...given('densityKgM3', densityKgM3),
    ...(densityKgM3 === null ? {} : { densityStatus: 'site' as const }),
    ...(radialPerPct === null || tangentialPerPct === null ? {} : { radialPerPct, tangentialPerPct }),
    movementClass: wood.movementClass,
    status: 'site',
    source: wood.source,
    ...(wood.note === '' ? {} : { note: wood.note }),
    oily: isOilyWood(speciesSlug(wood.latinName)),
  }
}

/** A wood of the table with a site's own figures over it; what the site left open stays as the table has it. */
export function overriddenSpecies(species: Species, own: SiteWood): ResolvedWood {
  const { radialPerPct, tangentialPerPct, densityKgM3 } = own
  const hasMovement = radialPerPct !== null && tangentialPerPct !== null
  const isMoved = hasMovement || own.movementClass !== species.movementClass
  return {
    ...species,
    ...(hasMovement ? { radialPerPct, tangentialPerPct } : {}),
    ...(densityKgM3 === null ? {} : { densityKgM3, densityStatus: 'site' as const }),
    movementClass: own.movementClass,
    status: isMoved ? 'site' : species.status,
    source: own.source === '' ? species.source : own.source,
    ...(own.note === '' ? {} : { note: own.note }),
  }
}

/**
 * The wood that a piece names, with the figures that count at its site.
 * @param wood a slug of the table, or `own-` and the code of a site's own wood; null where it isn't known
 * @param siteWoods the site's woods, put-away ones included: a piece keeps the wood that it was made of, while figures
 *   that were put away no longer stand over those of the table
 * @returns undefined for a wood that isn't known, which `movementOfWood` then takes as a middling one
 */
export function resolveWood(
  wood: string | null | undefined,
  siteWoods: readonly SiteWood[],
): ResolvedWood | undefined {
  if (wood === null || wood === undefined) return undefined
  const code = ownWoodCode(wood)
  if (code !== undefined) {
    const own = siteWoods.find((one) => one.overrides === null && one.code === code)
    return own && resolvedOwnWood(own)
  }
  const species = findSpecies(wood)
  const own = siteWoods.find((one) => one.overrides === wood && !one.isArchived)
  return species !== undefined && own !== undefined ? overriddenSpecies(species, own) : species
}

/** By what the dust, the oil and the protection of a wood are looked up: a species' slug, made from the Latin name for an own wood. */
export const latinSlugOf = (wood: Pick<ResolvedWood, 'slug' | 'latinName'>): string =>
  ownWoodCode(wood.slug) === undefined ? wood.slug : speciesSlug(wood.latinName)

/** What to be careful about with a wood: its dust, its protection. */
export const hazardsOfWood = (wood: Pick<ResolvedWood, 'slug' | 'latinName'>) => ({
  dust: dustNote(latinSlugOf(wood)) ?? null,
  protection: protectedNote(latinSlugOf(wood)) ?? null,
})
