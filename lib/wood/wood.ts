import { z } from 'zod'
import { movementOfWood, type WoodFigures } from './movement-class'
import { hazardsOfWood, movementClassSchema, ownWoodCode, type ResolvedWood } from './site-wood'

/** How the figures of a wood were come by, in words for a list. */
export const woodStatusWords = {
  read: 'read in its source',
  mixed: 'read in part, the rest from memory',
  secondary: 'from a trade page',
  'from memory': 'from memory',
  'none found': 'none found',
  'read (no shrinkage published)': 'read: no shrinkage is published',
  site: 'your own figures',
} as const satisfies Record<ResolvedWood['status'], string>

const statusSchema = z.enum(Object.keys(woodStatusWords) as [keyof typeof woodStatusWords])

/** A wood as the API gives it and the pages show it. */
export const woodSchema = z.object({
  /** Latin name in lower case with hyphens, or `own-` and a code. What a piece names its wood by. */
  slug: z.string(),
  commonName: z.string(),
  latinName: z.string(),
  movementClass: movementClassSchema,
  /** Fractions per % MC between 6 and 14 % MC; absent where none is known, and then the class counts. */
  radialPerPct: z.number().optional(),
  tangentialPerPct: z.number().optional(),
  /** At 12 % MC; absent where none is known. */
  densityKgM3: z.number().optional(),
  status: statusSchema,
  densityStatus: statusSchema.optional(),
  source: z.string(),
  note: z.string().optional(),
  oily: z.boolean(),
  /** What is reckoned with, whatever is known. */
  reckoned: z.object({
    radialPerPct: z.number(),
    tangentialPerPct: z.number(),
    differencePerPct: z.number(),
    densityKgM3: z.number(),
    /** Relative, ±. */
    movementDoubt: z.number(),
    /** What was taken from the class or as a middling figure: `movement`, `density`. */
    assumed: z.array(z.enum(['wood', 'movement', 'density'])),
  }),
  /** Null where none is published, which does not mean harmless. */
  dust: z.object({ effect: z.string(), kind: z.string(), status: z.string(), source: z.string() }).nullable(),
  /** Null where no listing is remembered, which does not mean free. */
  protection: z
    .object({
      listing: z.string(),
      status: z.literal('from memory'),
      checkedOn: z.iso.date(),
      ask: z.string(),
    })
    .nullable(),
  /** A wood of the site's own, not of the table. */
  isOwn: z.boolean(),
  /** The site has figures of its own for this wood of the table. */
  isOverridden: z.boolean(),
  /** Put away: pieces made of it keep it, and it isn't offered any more. */
  isArchived: z.boolean(),
  /** Of the site's own row; 0 for a wood that stands as the table has it. */
  version: z.int(),
})
export type Wood = z.infer<typeof woodSchema>

/** As much of a wood as a field for choosing one shows, and as `movementOfWood` needs. */
export type WoodChoice = WoodFigures &
  Pick<Wood, 'slug' | 'commonName' | 'latinName' | 'isOwn' | 'dust' | 'protection' | 'oily'>

export function woodChoice(wood: Wood): WoodChoice {
  const { slug, commonName, latinName, isOwn, dust, protection, oily } = wood
  const { radialPerPct, tangentialPerPct, densityKgM3, movementClass, status } = wood
  return {
    ...{ slug, commonName, latinName, isOwn, dust, protection, oily },
    ...{ radialPerPct, tangentialPerPct, densityKgM3, movementClass, status },
  }
}

/** A resolved wood as shown, with its fallback named and its cautions beside it. */
export function woodView(
  wood: ResolvedWood,
  row: { version: number; isArchived: boolean } | undefined,
): Wood {
  const { radialPerPct, tangentialPerPct, differencePerPct, densityKgM3, movementDoubt, assumed } =
    movementOfWood(wood)
  const isOwn = ownWoodCode(wood.slug) !== undefined
  return {
    ...wood,
    reckoned: {
      radialPerPct,
      tangentialPerPct,
      differencePerPct,
      densityKgM3,
      movementDoubt,
      assumed: [...assumed],
    },
    ...hazardsOfWood(wood),
    isOwn,
    isOverridden: !isOwn && row !== undefined,
    isArchived: isOwn && row?.isArchived === true,
    version: row?.version ?? 0,
  }
}
