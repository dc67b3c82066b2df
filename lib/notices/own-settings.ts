import { z } from 'zod'
import { codeSchema, timeOfDaySchema, timeZoneSchema, unitSystemSchema } from '@/lib/sites/site'
import { type Rule, ruleSchema } from './notice'

const instant = z.iso.datetime()

const channelsSchema = z.strictObject({ mailOn: z.boolean(), pushOn: z.boolean() })
export type RuleChannels = z.infer<typeof channelsSchema>

const quietSchema = z.strictObject({ from: timeOfDaySchema, to: timeOfDaySchema })

/** A membership, as the list of members names it. */
const memberIdSchema = z.string().min(1).max(64)

export const digestSchema = z.enum(['none', 'daily', 'weekly'])
export type Digest = z.infer<typeof digestSchema>

/** What one member has chosen for themselves at one site. */
export const ownSettingsSchema = z.object({
  /** Null: the site's. */
  unitSystem: unitSystemSchema.nullable(),
  mailOn: z.boolean(),
  pushOn: z.boolean(),
  onHouseList: z.boolean(),
  /** Null: the site's. */
  quiet: quietSchema.nullable(),
  timeZone: z.string().nullable(),
  digest: digestSchema,
  digestAt: z.string(),
  /** ISO: 1 is Monday. */
  digestWeekday: z.int(),
  away: z.object({ from: instant, until: instant, coverId: memberIdSchema.nullable() }).nullable(),
  sessionUntil: instant.nullable(),
  rules: z.partialRecord(ruleSchema, channelsSchema),
  version: z.int(),
})
export type OwnSettings = z.infer<typeof ownSettingsSchema>

export const ownSettingsChangeSchema = z.strictObject({
  unitSystem: unitSystemSchema.nullable().optional(),
  mailOn: z.boolean().optional(),
  pushOn: z.boolean().optional(),
  onHouseList: z.boolean().optional(),
  quiet: quietSchema.nullable().optional(),
  timeZone: timeZoneSchema.nullable().optional(),
  digest: digestSchema.optional(),
  digestAt: timeOfDaySchema.optional(),
  digestWeekday: z.int().min(1).max(7).optional(),
  away: z
    .strictObject({ from: instant, until: instant, coverId: memberIdSchema.nullable() })
    .refine(({ from, until }) => new Date(until) > new Date(from), {
      path: ['until'],
      error: 'must be after the day you leave',
    })
    .nullable()
    .optional(),
  sessionUntil: instant.nullable().optional(),
  /** Only the rules named change; null takes a choice back. */
  rules: z.partialRecord(ruleSchema, channelsSchema.nullable()).optional(),
})
export type OwnSettingsChange = z.infer<typeof ownSettingsChangeSchema>

/** A session at work ends by itself after this long at most: nobody may stay silent by an oversight. A guess. */
export const sessionMostMs = 12 * 3_600_000

/** What the page needs beside the choices themselves. */
export const hearingSchema = z.object({
  settings: ownSettingsSchema,
  phones: z.array(
    z.object({
      /** What a browser compares with its own subscription. */
      endpoint: z.string(),
      device: z.string(),
      createdAt: instant,
      lastSentAt: instant.nullable(),
      isGone: z.boolean(),
    }),
  ),
  /** Who may cover, in the order in which they joined; never oneself, never an onlooker. */
  covers: z.array(z.object({ id: memberIdSchema, name: z.string() })),
  /** Who is told in turn when somebody can't. */
  houseList: z.array(z.object({ name: z.string(), isYou: z.boolean() })),
  /** The key that a browser signs up with; null: nothing can be sent to phones from here. */
  pushKey: z.string().nullable(),
  siteId: codeSchema,
})
export type Hearing = z.infer<typeof hearingSchema>

/** Whether a choice for a rule differs from what holds for all. */
export const channelsFor = (
  settings: Pick<OwnSettings, 'mailOn' | 'pushOn' | 'rules'>,
  rule: Rule,
): RuleChannels => settings.rules[rule] ?? { mailOn: settings.mailOn, pushOn: settings.pushOn }
