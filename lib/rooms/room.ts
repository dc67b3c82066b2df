import { z } from 'zod'

export const roomKindSchema = z.enum(['cupboard', 'house', 'shop', 'store', 'tub', 'van', 'outdoor'])
export type RoomKind = z.infer<typeof roomKindSchema>

export const roomKindWords: Record<RoomKind, string> = {
  cupboard: 'cupboard in the house',
  house: 'room in the house',
  shop: 'shop',
  store: 'timber store',
  tub: 'lidded tub',
  van: 'van',
  outdoor: 'outdoors',
}

/** Rooms that wood is kept in for long; the others are judged by the stricter idea of "fresh" (policy). */
export function isKeepingRoom(kind: RoomKind): boolean {
  return kind === 'cupboard' || kind === 'house'
}

const id = z.string()
const instant = z.iso.datetime()

export const newRoomSchema = z.strictObject({
  name: z.string().trim().min(1, 'give it a name').max(60, '60 letters at most'),
  kind: roomKindSchema,
  isShared: z.boolean().default(false),
  keepsDryWork: z.boolean().optional(),
  note: z.string().trim().max(2000).default(''),
})
export type NewRoom = z.infer<typeof newRoomSchema>

export const roomChangeSchema = z.strictObject({
  name: newRoomSchema.shape.name.optional(),
  kind: roomKindSchema.optional(),
  isShared: z.boolean().optional(),
  keepsDryWork: z.boolean().optional(),
  note: z.string().trim().max(2000).optional(),
})
export type RoomChange = z.infer<typeof roomChangeSchema>

/** The air of a room as last read. `fresh` is the only kind on which anything may be judged. */
export const roomAirSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.enum(['fresh', 'stale']),
    at: instant,
    ageS: z.number(),
    temperatureC: z.number(),
    humidityPct: z.number(),
    emcPct: z.number(),
    emcDoubtPct: z.number(),
    dewPointC: z.number().nullable(),
    isTyped: z.boolean(),
    flags: z.array(z.string()),
  }),
  z.object({ kind: z.literal('never') }),
])
export type RoomAir = z.infer<typeof roomAirSchema>

export const roomSchema = z.object({
  id,
  name: z.string(),
  kind: roomKindSchema,
  /** Which of the room marks stands for it, 0 to 6. */
  mark: z.int(),
  isShared: z.boolean(),
  keepsDryWork: z.boolean(),
  note: z.string(),
  version: z.int(),
  /** Onlookers get the day's middle instead of the last reading. */
  air: roomAirSchema,
  /** Own last twelve months of daily EMC: 1 in 20, middle, 19 in 20; absent below 20 days of record. */
  year: z
    .object({ emcPctLow: z.number(), emcPctMiddle: z.number(), emcPctHigh: z.number(), days: z.int() })
    .nullable(),
  sensors: z.int(),
  pieces: z.int(),
})
export type Room = z.infer<typeof roomSchema>

/** Everything on a room's own page beside the series. */
export const roomDetailSchema = roomSchema.extend({
  /** One sentence that a maker could act on. */
  headline: z.string(),
  words: z.array(z.string()),
  today: z.object({ emcPctMin: z.number(), emcPctMax: z.number(), n: z.int() }).nullable(),
  month: z
    .object({ emcPctMin: z.number(), emcPctMax: z.number(), emcPctMean: z.number(), days: z.int() })
    .nullable(),
  /** For setting against on the rule: the other rooms, with fresh air only. */
  others: z.array(z.object({ id, name: z.string(), mark: z.int(), emcPct: z.number() })),
  here: z.array(
    z.object({
      id,
      number: z.string(),
      title: z.string(),
      stage: z.enum(['blank', 'roughed', 'box']),
      isOut: z.boolean(),
    }),
  ),
  hangs: z.array(z.object({ id, name: z.string(), spot: z.string(), isTyped: z.boolean() })),
  cautions: z.array(z.string()),
  completeTo: instant.nullable(),
})
export type RoomDetail = z.infer<typeof roomDetailSchema>

/** Columns of equal length; a gap is `null` in every measure. */
export const roomSeriesSchema = z.object({
  grain: z.enum(['raw', 'hour', 'day']),
  from: instant,
  to: instant,
  at: z.array(instant),
  temperatureC: z.array(z.number().nullable()),
  humidityPct: z.array(z.number().nullable()),
  emcPct: z.array(z.number().nullable()),
  emcPctMin: z.array(z.number().nullable()),
  emcPctMax: z.array(z.number().nullable()),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type RoomSeries = z.infer<typeof roomSeriesSchema>

export const typedReadingSchema = z.strictObject({
  at: instant.optional(),
  temperatureC: z.number().min(-40, 'between −40 and 80 °C').max(80, 'between −40 and 80 °C'),
  humidityPct: z.number().min(0, 'between 0 and 100 % RH').max(100, 'between 0 and 100 % RH'),
})
export type TypedReading = z.infer<typeof typedReadingSchema>
