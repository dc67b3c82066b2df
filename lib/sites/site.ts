import { z } from 'zod'
import { roomKindSchema } from '@/lib/rooms/room'
import { roleSchema } from './permissions'

export const unitSystemSchema = z.enum(['metric', 'imperial'])
export type UnitSystem = z.infer<typeof unitSystemSchema>

export const codeSchema = z.string().regex(/^[2-9abcdefghjkmnpqrstvwxyz]{10}$/, 'not an id')

/** An IANA time zone that this runtime knows. */
export const timeZoneSchema = z
  .string()
  .max(64)
  .refine((zone) => {
    try {
      new Intl.DateTimeFormat('en-GB', { timeZone: zone })
      return true
    } catch {
      return false
    }
  }, 'not a time zone that we know, such as Europe/London')

export const timeOfDaySchema = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'a time such as 22:00')

/** Smallest change that a scale shows, g. */
export const scaleStepSchema = z.number().min(0.001, '0.001 to 100 g').max(100, '0.001 to 100 g')

export const siteNameSchema = z.string().trim().min(1, 'give it a name').max(80, '80 letters at most')

export const newSiteSchema = z.strictObject({
  name: siteNameSchema,
  timeZone: timeZoneSchema,
  unitSystem: unitSystemSchema.default('metric'),
  rooms: z
    .array(z.strictObject({ name: z.string().trim().min(1).max(60), kind: roomKindSchema }))
    .max(20)
    .default([]),
})
export type NewSite = z.infer<typeof newSiteSchema>

export const siteChangeSchema = z.strictObject({
  name: siteNameSchema.optional(),
  timeZone: timeZoneSchema.optional(),
  unitSystem: unitSystemSchema.optional(),
  quietFrom: timeOfDaySchema.optional(),
  quietTo: timeOfDaySchema.optional(),
  lockUpAt: timeOfDaySchema.optional(),
  /** Step of the scale, g; null for not told. */
  scaleStepG: scaleStepSchema.nullable().optional(),
})
export type SiteChange = z.infer<typeof siteChangeSchema>

export const siteSchema = z.object({
  id: codeSchema,
  name: z.string(),
  timeZone: z.string(),
  unitSystem: unitSystemSchema,
  quietFrom: z.string(),
  quietTo: z.string(),
  lockUpAt: z.string(),
  scaleStepG: z.number().nullable(),
  isDemo: z.boolean(),
  version: z.int(),
  /** The signed-in member's role here. */
  role: roleSchema,
})
export type Site = z.infer<typeof siteSchema>

/** What the frame round every page shows: counts beside the page names, and who is signed in. */
export const siteFrameSchema = z.object({
  site: siteSchema,
  sites: z.array(z.object({ id: codeSchema, name: z.string() })),
  user: z.object({ name: z.string(), email: z.string() }),
  unitSystem: unitSystemSchema,
  counts: z.object({
    rooms: z.int(),
    sensors: z.int(),
    sensorsHeard: z.int(),
    sensorsSilent: z.int(),
    pieces: z.int(),
    newNotices: z.int(),
  }),
  at: z.iso.datetime(),
})
export type SiteFrame = z.infer<typeof siteFrameSchema>

export const memberSchema = z.object({
  id: z.string(),
  name: z.string(),
  /** Absent for readers who may not see addresses. */
  email: z.string().optional(),
  role: roleSchema,
  isYou: z.boolean(),
  isOnlyOwner: z.boolean(),
  lastHereAt: z.iso.datetime().nullable(),
})
export type Member = z.infer<typeof memberSchema>

export const invitationSchema = z.object({
  id: z.string(),
  email: z.string(),
  role: roleSchema,
  invitedAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  state: z.enum(['waiting', 'expired']),
})
export type Invitation = z.infer<typeof invitationSchema>

export const newInvitationSchema = z.strictObject({
  email: z.email('not an e-mail address').max(254),
  role: roleSchema,
})
