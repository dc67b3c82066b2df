import { z } from 'zod'
import { fitGradeSchema, pieceEventSchema } from './piece'

/** What happened to a piece. Every entry can be undone by a later one; nothing is erased. */
export const eventKindSchema = z.enum([
  'final-fit',
  're-true',
  'roughed',
  'near-final',
  'cut',
  'oil',
  'wax',
  'label',
  'meter',
  'oven-dry',
  'note',
])
export type EventKind = z.infer<typeof eventKindSchema>

export const eventKindWords: Record<EventKind, string> = {
  'final-fit': 'final fit',
  're-true': 're-true',
  roughed: 'roughed out',
  'near-final': 'turned to near final',
  cut: 'cut',
  oil: 'oiled',
  wax: 'waxed',
  label: 'label put on or taken off',
  meter: 'meter reading',
  'oven-dry': 'oven-dry mass',
  note: 'note',
}

/** Kinds that add or take mass: weights before and after can't be compared. */
export const closesSeries: ReadonlySet<EventKind> = new Set([
  'roughed',
  'near-final',
  'final-fit',
  're-true',
  'cut',
  'oil',
  'wax',
  'label',
])

/** Kinds from which the oval of a joint counts anew. */
export const isFitKind = (kind: EventKind): kind is 'final-fit' | 're-true' =>
  kind === 'final-fit' || kind === 're-true'

const instant = z.iso.datetime()

export const eventDataSchema = z.object({
  ringMcPct: z.number().optional(),
  lidMcPct: z.number().optional(),
  doubtPct: z.number().optional(),
  /** Where the moisture content at a fit comes from: the piece as followed, or its keep room's mean of that month. */
  basis: z.enum(['followed', 'month-mean']).optional(),
  fitGrade: fitGradeSchema.nullable().optional(),
  clearanceMm: z.number().nullable().optional(),
  jointDiameterMm: z.number().optional(),
  mcPct: z.number().optional(),
  ovenDryG: z.number().optional(),
})
export type EventData = z.infer<typeof eventDataSchema>

/** A new entry. What the wood was at that moment is worked out by the server, never sent. */
export const newEventSchema = z
  .strictObject({
    kind: eventKindSchema,
    at: instant.optional(),
    note: z.string().trim().max(1000).default(''),
    /** For a final fit or a re-true: how the lid fits now. */
    fitGrade: fitGradeSchema.nullable().optional(),
    clearanceMm: z.number().min(0).max(5).nullable().optional(),
    /** The joint as it was cut, outside of the spigot; left out where it is what it was. */
    jointDiameterMm: z.number().min(5, '5 to 600 mm').max(600, '5 to 600 mm').optional(),
    /** For a meter reading, % MC. */
    mcPct: z.number().min(4, '4 to 30 % MC').max(30, '4 to 30 % MC').optional(),
    /** For an oven-dry mass, g. */
    ovenDryG: z.number().gt(0).max(200_000).optional(),
  })
  .superRefine((event, context) => {
    const needs = (path: 'mcPct' | 'ovenDryG', kind: EventKind) => {
      if (event.kind === kind && event[path] === undefined)
        context.addIssue({ code: 'custom', path: [path], message: 'needed' })
      if (event.kind !== kind && event[path] !== undefined)
        context.addIssue({ code: 'custom', path: [path], message: `goes with ${kind}` })
    }
    needs('mcPct', 'meter')
    needs('ovenDryG', 'oven-dry')
    for (const path of ['fitGrade', 'clearanceMm', 'jointDiameterMm'] as const)
      if (!isFitKind(event.kind) && event[path] !== undefined)
        context.addIssue({ code: 'custom', path: [path], message: 'goes with a final fit or a re-true' })
  })
export type NewEvent = z.infer<typeof newEventSchema>

/** What can be entered for a piece: a move to another room, or something that happened to it. */
export const enteredEventSchema = z.discriminatedUnion('kind', [pieceEventSchema, newEventSchema])

export const pieceEventViewSchema = z.object({
  id: z.string(),
  kind: eventKindSchema,
  at: instant,
  room: z.object({ id: z.string(), name: z.string(), mark: z.int() }).nullable(),
  data: eventDataSchema,
  note: z.string(),
  by: z.string().nullable(),
  isUndone: z.boolean(),
})
export type PieceEventView = z.infer<typeof pieceEventViewSchema>

export const newWeighingSchema = z.strictObject({
  grams: z.number().gt(0, 'above 0 g').max(200_000, 'at most 200 kg'),
  at: instant.optional(),
  /** Step of the scale; the site's own when left out. */
  stepG: z.number().gt(0).max(100).optional(),
  note: z.string().trim().max(1000).default(''),
})
export type NewWeighing = z.infer<typeof newWeighingSchema>

export const weighingSchema = z.object({
  id: z.string(),
  at: instant,
  grams: z.number(),
  stepG: z.number().nullable(),
  note: z.string(),
  by: z.string().nullable(),
  isUndone: z.boolean(),
})
export type Weighing = z.infer<typeof weighingSchema>
