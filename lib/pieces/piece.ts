import { z } from 'zod'

export const stageSchema = z.enum(['blank', 'roughed', 'box'])
export type Stage = z.infer<typeof stageSchema>

/** How the wood behaves, as far as it can be worked out at all. */
export const woodKindSchema = z.enum(['plain', 'stabilised', 'hybrid', 'wild'])
export type WoodKind = z.infer<typeof woodKindSchema>

/** end-grain: the axis runs along the grain (a spindle). side-grain: across it. */
export const grainSchema = z.enum(['end-grain', 'side-grain'])
export type Grain = z.infer<typeof grainSchema>

export const spigotOnSchema = z.enum(['base', 'lid'])
export const lidFormSchema = z.enum(['plug', 'hollow'])

export const fitGradeSchema = z.enum(['suction', 'snap', 'snug', 'easy', 'loose', 'threaded'])
export type FitGrade = z.infer<typeof fitGradeSchema>

/** How a piece sits out there. "closed" is a piece at rest in its room with the lid on and nobody handling it. */
export const coverSchema = z.enum(['open', 'lid-on', 'bagged', 'tub'])
export type Cover = z.infer<typeof coverSchema>
export const placeCoverSchema = z.enum(['open', 'lid-on', 'bagged', 'tub', 'closed'])
export type PlaceCover = z.infer<typeof placeCoverSchema>

export const coverWords: Record<PlaceCover, string> = {
  open: 'open in work',
  'lid-on': 'lid on',
  bagged: 'bagged',
  tub: 'in the tub',
  closed: 'at rest, lid on',
}

const mm = (min: number, max: number) =>
  z.number().min(min, `${min} to ${max} mm`).max(max, `${min} to ${max} mm`)
const instant = z.iso.datetime()
const day = z.iso.date()

const facts = {
  number: z
    .string()
    .trim()
    .min(1, 'give it a number')
    .max(12, '12 signs at most')
    .regex(/^[\p{L}\p{N}][\p{L}\p{N}./-]*$/u, 'letters, digits, and . / - between them'),
  stage: stageSchema,
  /** Latin name in lower case with hyphens, or null when the wood is not known. */
  wood: z.string().max(60).nullable(),
  woodKind: woodKindSchema,
  grain: grainSchema,
  spigotOn: spigotOnSchema,
  lidForm: lidFormSchema,
  jointDiameterMm: mm(5, 600).nullable(),
  wallMm: mm(1, 60).nullable(),
  spigotMm: mm(1, 60).nullable(),
  lidMm: mm(1, 100).nullable(),
  bodyWallMm: mm(1, 100).nullable(),
  /** Wall round the recess of a hollow lid. */
  lidWallMm: mm(1, 60).nullable(),
  /** Thickness of a blank in the round, and whether its ends are sealed. */
  blankDiameterMm: mm(10, 600).nullable(),
  endsSealed: z.boolean(),
  roughedOn: day.nullable(),
  /** The maker's word: weights alone decide whether it is ready. */
  isReadyByWeight: z.boolean(),
  fitGrade: fitGradeSchema.nullable(),
  clearanceMm: mm(0, 5).nullable(),
  allowanceMm: mm(0.01, 5).nullable(),
  finish: z.string().trim().max(200),
  keepRoomId: z.string().nullable(),
  fittedRoomId: z.string().nullable(),
  /** The month counts; the first of it will do. */
  fittedOn: day.nullable(),
  note: z.string().trim().max(4000),
  isPrivate: z.boolean(),
  isShared: z.boolean(),
}

/** Five answers make a piece; the rest is defaulted and shown as assumed. */
export const newPieceSchema = z.strictObject({
  number: facts.number,
  wood: facts.wood,
  jointDiameterMm: facts.jointDiameterMm,
  fitGrade: facts.fitGrade,
  roomId: z.string(),
  stage: facts.stage.default('box'),
  woodKind: facts.woodKind.default('plain'),
  grain: facts.grain.default('end-grain'),
  spigotOn: facts.spigotOn.default('base'),
  lidForm: facts.lidForm.default('plug'),
  wallMm: facts.wallMm.default(null),
  spigotMm: facts.spigotMm.default(null),
  lidMm: facts.lidMm.default(null),
  bodyWallMm: facts.bodyWallMm.default(null),
  lidWallMm: facts.lidWallMm.default(null),
  blankDiameterMm: facts.blankDiameterMm.default(null),
  endsSealed: facts.endsSealed.default(false),
  roughedOn: facts.roughedOn.default(null),
  isReadyByWeight: facts.isReadyByWeight.default(false),
  clearanceMm: facts.clearanceMm.default(null),
  allowanceMm: facts.allowanceMm.default(null),
  finish: facts.finish.default(''),
  keepRoomId: facts.keepRoomId.default(null),
  fittedRoomId: facts.fittedRoomId.default(null),
  fittedOn: facts.fittedOn.default(null),
  note: facts.note.default(''),
  isPrivate: facts.isPrivate.default(false),
  isShared: facts.isShared.default(false),
})
export type NewPiece = z.infer<typeof newPieceSchema>

export const pieceChangeSchema = z.strictObject(facts).partial()
export type PieceChange = z.infer<typeof pieceChangeSchema>

export const pieceMoveSchema = z.strictObject({
  roomId: z.string(),
  at: instant.optional(),
})

/** A piece goes to stay in another room. What else can happen to it: `enteredEventSchema`. */
export const pieceEventSchema = z.strictObject({ kind: z.literal('move'), ...pieceMoveSchema.shape })

export const pieceSortSchema = z.enum([
  'number',
  '-number',
  'wood',
  '-wood',
  'room',
  '-room',
  'created',
  '-created',
])

export const pieceListQuerySchema = z.strictObject({
  q: z.string().trim().max(60).optional(),
  stage: stageSchema.optional(),
  room: z.string().optional(),
  out: z.enum(['yes', 'no']).optional(),
  sort: pieceSortSchema.default('number'),
})

/** One line of the list. */
export const pieceSchema = z.object({
  id: z.string(),
  number: z.string(),
  stage: stageSchema,
  /** "Ash box", "Walnut blank": wood and stage in words. */
  title: z.string(),
  wood: z.string().nullable(),
  woodName: z.string(),
  woodKind: woodKindSchema,
  jointDiameterMm: z.number().nullable(),
  fitGrade: fitGradeSchema.nullable(),
  room: z.object({ id: z.string(), name: z.string(), mark: z.int() }).nullable(),
  cover: placeCoverSchema,
  since: instant.nullable(),
  isOut: z.boolean(),
  keepRoom: z.object({ id: z.string(), name: z.string(), mark: z.int() }).nullable(),
  version: z.int(),
  /** Private to its maker: only number, room and time out are given, and the rest stands empty. */
  isHidden: z.boolean().optional(),
})
export type Piece = z.infer<typeof pieceSchema>

export const pieceDetailSchema = pieceSchema.extend({
  grain: grainSchema,
  spigotOn: spigotOnSchema,
  lidForm: lidFormSchema,
  wallMm: z.number().nullable(),
  spigotMm: z.number().nullable(),
  lidMm: z.number().nullable(),
  bodyWallMm: z.number().nullable(),
  lidWallMm: z.number().nullable(),
  blankDiameterMm: z.number().nullable(),
  endsSealed: z.boolean(),
  roughedOn: day.nullable(),
  isReadyByWeight: z.boolean(),
  clearanceMm: z.number().nullable(),
  allowanceMm: z.number().nullable(),
  finish: z.string(),
  fittedRoomId: z.string().nullable(),
  fittedOn: day.nullable(),
  note: z.string(),
  isPrivate: z.boolean(),
  isShared: z.boolean(),
  isYours: z.boolean(),
  /** Put away; it can be brought out again. */
  isArchived: z.boolean().optional(),
  createdAt: instant,
  /** What was not told and is taken as usual, each as a short phrase. */
  assumed: z.array(z.string()),
  /** One sentence of where it stands and what to do next. */
  headline: z.string(),
  /** Where its wood stands now, as far as can be worked out. */
  mc: z
    .object({
      ringMcPct: z.number(),
      lidMcPct: z.number(),
      cutMcPct: z.number(),
      doubtPct: z.number(),
      usedFraction: z.number().nullable(),
      lossMm: z.number().nullable(),
      allowanceMm: z.number().nullable(),
    })
    .nullable(),
  places: z.array(
    z.object({
      room: z.object({ id: z.string(), name: z.string(), mark: z.int() }),
      fromAt: instant,
      toAt: instant.nullable(),
      cover: placeCoverSchema,
      by: z.string().nullable(),
    }),
  ),
  /** Dust and allergy notes for the wood, each with its source. Never dismissible for good. */
  dust: z.array(z.object({ text: z.string(), source: z.string() })),
  cautions: z.array(z.string()),
})
export type PieceDetail = z.infer<typeof pieceDetailSchema>
