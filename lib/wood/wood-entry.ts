import { z } from 'zod'
import { perPctFromShrinkage } from './movement'
import { movementClassSchema, type SiteWoodChange, wrongFigures } from './site-wood'
import type { Species } from './species'
import type { Wood } from './wood'

/** What a maker types about a wood, and what it comes to. */

/** On what the movement rests: nothing but the class, shrinkage as printed in tables, or the change for each point of % MC. */
export const movementBasisSchema = z.enum(['class', 'shrinkage', 'point'])
export type MovementBasis = z.infer<typeof movementBasisSchema>

const text = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `${String(max)} letters at most`)

const entryShape = z.strictObject({
  commonName: text(60),
  latinName: text(80),
  movementClass: movementClassSchema,
  basis: movementBasisSchema,
  /** Across and along the rings, in what `basis` says: % of the green size, or thousandths of the size. */
  across: z.string(),
  along: z.string(),
  density: z.string(),
  source: text(300),
  note: text(1000),
})
export type WoodEntry = z.infer<typeof entryShape>

/** A number as typed, with a comma or a point; null for an empty field, NaN for anything that is no number. */
function numberOf(typed: string): number | null {
  const bare = typed.trim().replace(',', '.')
  if (bare === '') return null
  return /^\d{1,5}(\.\d{0,4})?$|^\.\d{1,4}$/.test(bare) ? Number(bare) : Number.NaN
}

/** Largest shrinkage from green to oven-dry that is taken, % of the green size: above that no wood is known. */
const SHRINKAGE_MAX_PCT = 25
/** Largest change for each point, in thousandths of the size. */
const POINT_MAX = 10

/** A typed movement as a fraction per % MC; a text says what is wrong with it. */
function perPctOf(typed: string, basis: MovementBasis): number | null | string {
  if (basis === 'class') return null
  const value = numberOf(typed)
  const max = basis === 'shrinkage' ? SHRINKAGE_MAX_PCT : POINT_MAX
  if (value === null) return 'give both directions, or choose the class alone'
  if (!(value > 0 && value <= max)) return `a number above 0, ${String(max)} at most`
  // To the digits that tables have, so that a figure is not shown more exact than it is.
  const perPct = basis === 'shrinkage' ? perPctFromShrinkage(value) : value / 1000
  return Math.round(perPct * 1e5) / 1e5
}

export type WoodEntryFigures = Required<Omit<SiteWoodChange, 'commonName' | 'latinName'>>

/** What an entry comes to as it stands: fractions per % MC, or undefined where it can't be worked out yet. */
export function movementOfEntry(
  entry: Pick<WoodEntry, 'basis' | 'across' | 'along'>,
): { radialPerPct: number; tangentialPerPct: number } | undefined {
  const radialPerPct = perPctOf(entry.across, entry.basis)
  const tangentialPerPct = perPctOf(entry.along, entry.basis)
  return typeof radialPerPct === 'number' && typeof tangentialPerPct === 'number'
    ? { radialPerPct, tangentialPerPct }
    : undefined
}

function figuresOf(entry: WoodEntry, context: z.RefinementCtx): WoodEntryFigures {
  const issue = (path: keyof WoodEntry, message: string) => {
    context.addIssue({ code: 'custom', path: [path], message })
  }
  const across = perPctOf(entry.across, entry.basis)
  const along = perPctOf(entry.along, entry.basis)
  if (typeof across === 'string') issue('across', across)
  if (typeof along === 'string') issue('along', along)
  const density = numberOf(entry.density)
  if (density !== null && !(density >= 200 && density <= 1400))
    issue('density', 'a number from 200 to 1400 kg/m³, or leave it empty')
  const radialPerPct = typeof across === 'string' ? null : across
  const tangentialPerPct = typeof along === 'string' ? null : along
  if (radialPerPct !== null && tangentialPerPct !== null) {
    const wrong = wrongFigures({ radialPerPct, tangentialPerPct })
    if (wrong !== undefined) issue('along', wrong.message)
  }
  const { movementClass, source, note } = entry
  return { movementClass, radialPerPct, tangentialPerPct, densityKgM3: density, source, note }
}

/** A wood of the site's own, as typed. */
export const ownWoodEntrySchema = entryShape.transform((entry, context) => {
  if (entry.commonName === '')
    context.addIssue({ code: 'custom', path: ['commonName'], message: 'give it a name' })
  return { commonName: entry.commonName, latinName: entry.latinName, ...figuresOf(entry, context) }
})

/** A site's figures for a wood of the table, as typed; the names are the table's. */
export const woodFiguresEntrySchema = entryShape.transform(figuresOf)

/** Figures that are the table's own are not stored as a site's: they stay as the table has them, also when it changes. */
export function figuresOverTable(figures: WoodEntryFigures, table: Species): WoodEntryFigures {
  const { radialPerPct, tangentialPerPct, densityKgM3 } = figures
  const isMovementOfTable =
    radialPerPct === (table.radialPerPct ?? null) && tangentialPerPct === (table.tangentialPerPct ?? null)
  return {
    ...figures,
    ...(isMovementOfTable ? { radialPerPct: null, tangentialPerPct: null } : {}),
    densityKgM3: densityKgM3 === (table.densityKgM3 ?? null) ? null : densityKgM3,
  }
}

const figure = (value: number | undefined, per = 1): string =>
  value === undefined ? '' : String(Math.round(value * per * 1000) / 1000)

/** What the form begins with: the figures of a wood as they stand, or nothing. */
export function woodEntryOf(wood: Wood | undefined): WoodEntry {
  const hasMovement = wood?.radialPerPct !== undefined
  const isOfSite = wood?.isOwn === true || wood?.isOverridden === true
  return {
    commonName: wood?.commonName ?? '',
    latinName: wood?.latinName ?? '',
    movementClass: wood?.movementClass ?? 'medium',
    basis: hasMovement ? 'point' : 'class',
    across: figure(wood?.radialPerPct, 1000),
    along: figure(wood?.tangentialPerPct, 1000),
    density: figure(wood?.densityKgM3),
    // Published figures are not the site's own: their source is asked for anew.
    source: isOfSite ? (wood?.source ?? '') : '',
    note: isOfSite ? (wood?.note ?? '') : '',
  }
}

/** Where the form shows what the API has against a field. */
export const entryFieldOf: Readonly<Record<string, keyof WoodEntry>> = {
  commonName: 'commonName',
  latinName: 'latinName',
  movementClass: 'movementClass',
  radialPerPct: 'across',
  tangentialPerPct: 'along',
  densityKgM3: 'density',
  source: 'source',
  note: 'note',
}
