import { z } from 'zod'

const instant = z.iso.datetime()

export const newSensorSchema = z.strictObject({
  name: z.string().trim().min(1, 'give it a name').max(60, '60 letters at most'),
  roomId: z.string(),
  spot: z.string().trim().max(200).default(''),
})
export type NewSensor = z.infer<typeof newSensorSchema>

export const sensorChangeSchema = z.strictObject({
  name: newSensorSchema.shape.name.optional(),
})

/** Since when a sensor hangs where. A time in the past moves the readings taken since then. */
export const newPlacementSchema = z.strictObject({
  roomId: z.string(),
  fromAt: instant.optional(),
  spot: z.string().trim().max(200).default(''),
})
export type NewPlacement = z.infer<typeof newPlacementSchema>

export const sensorStateWordSchema = z.enum(['alive', 'late', 'silent', 'never-heard', 'retired'])
export type SensorStateWord = z.infer<typeof sensorStateWordSchema>

export const sensorSchema = z.object({
  id: z.string(),
  name: z.string(),
  kind: z.enum(['device', 'typed']),
  state: sensorStateWordSchema,
  room: z.object({ id: z.string(), name: z.string(), mark: z.int() }).nullable(),
  spot: z.string(),
  last: z
    .object({
      at: instant,
      temperatureC: z.number(),
      humidityPct: z.number(),
      emcPct: z.number(),
    })
    .nullable(),
  heardAt: instant.nullable(),
  usualGapS: z.number().nullable(),
  batteryPct: z.number().nullable(),
  clock: z.enum(['right', 'not-set', 'ahead']),
  refusedToday: z.int(),
  version: z.int(),
  createdAt: instant,
})
export type Sensor = z.infer<typeof sensorSchema>

export const sensorDetailSchema = sensorSchema.extend({
  topic: z.string(),
  signInName: z.string(),
  broker: z.object({ host: z.string(), port: z.int() }),
  placements: z.array(
    z.object({
      room: z.object({ id: z.string(), name: z.string(), mark: z.int() }),
      fromAt: instant,
      toAt: instant.nullable(),
      spot: z.string(),
    }),
  ),
  /** Today's counts of what was not simply stored, by kind: duplicate, conflict, late, refused. */
  counts: z.record(z.string(), z.int()),
})
export type SensorDetail = z.infer<typeof sensorDetailSchema>

/** Shown once, when a sensor is made or its secret renewed. */
export const sensorCredentialSchema = z.object({
  signInName: z.string(),
  secret: z.string(),
  topic: z.string(),
  broker: z.object({ host: z.string(), port: z.int() }),
})
export type SensorCredential = z.infer<typeof sensorCredentialSchema>

export const refusedSchema = z.object({
  id: z.string(),
  at: instant,
  sensor: z.object({ id: z.string(), name: z.string() }).nullable(),
  topic: z.string(),
  reason: z.string(),
  /** In words: what was wrong and what to do. */
  words: z.string(),
  field: z.string().nullable(),
  detail: z.string(),
  sizeBytes: z.int(),
  headHex: z.string(),
})
export type Refused = z.infer<typeof refusedSchema>

/** A reading as it was taken, with what it means for wood. */
export const sensorReadingSchema = z.object({
  at: instant,
  temperatureC: z.number(),
  humidityPct: z.number(),
  emcPct: z.number(),
})
export type SensorReading = z.infer<typeof sensorReadingSchema>
