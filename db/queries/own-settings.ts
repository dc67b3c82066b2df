import { type Kysely, sql } from 'kysely'
import type { PersonWishes } from '@/lib/notices/inputs'
import { type Rule, ruleSchema } from '@/lib/notices/notice'
import { digestSchema, type OwnSettings, type RuleChannels } from '@/lib/notices/own-settings'
import { usualWishes } from '@/lib/notices/routing'
import { unitSystemSchema } from '@/lib/sites/site'
import type { Database } from '../schema'

/** A member's choices as they are stored: people by their user, instants as dates. */
export type SettingsRecord = Omit<OwnSettings, 'away' | 'sessionUntil'> & {
  away: { from: Date; until: Date; coverUserId: string | null } | null
  sessionUntil: Date | null
}
export type SettingsChange = Partial<Omit<SettingsRecord, 'rules' | 'version'>> & {
  rules?: Partial<Record<Rule, RuleChannels | null>>
}

const wishColumns = [
  'setting.push_on',
  'setting.quiet_from',
  'setting.quiet_to',
  'setting.time_zone',
  'setting.digest',
  'setting.digest_at',
  'setting.digest_weekday',
  'setting.away_from',
  'setting.away_until',
  'setting.away_cover',
  'setting.session_until',
] as const

export async function findSettings(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
): Promise<SettingsRecord> {
  const row = await db
    .selectFrom('member_setting as setting')
    .where('site_id', '=', siteId)
    .where('user_id', '=', userId)
    .select(['unit_system', 'mail_on', 'on_house_list', 'version', ...wishColumns])
    .executeTakeFirst()
  const rules = await listRuleChoices(db, siteId, [userId])
  return {
    unitSystem: unitSystemSchema.nullable().parse(row?.unit_system ?? null),
    mailOn: row?.mail_on ?? true,
    pushOn: row?.push_on ?? true,
    onHouseList: row?.on_house_list ?? false,
    quiet: quietOf(row),
    timeZone: row?.time_zone ?? null,
    digest: digestSchema.parse(row?.digest ?? usualWishes.digest),
    digestAt: (row?.digest_at ?? usualWishes.digestAt).slice(0, 5),
    digestWeekday: row?.digest_weekday ?? usualWishes.digestWeekday,
    away: awayOf(row),
    sessionUntil: row?.session_until ?? null,
    rules: rules.get(userId) ?? {},
    version: row?.version ?? 1,
  }
}

const quietOf = (row: { quiet_from: string | null; quiet_to: string | null } | undefined) =>
  row === undefined || row.quiet_from === null || row.quiet_to === null
    ? null
    : // A time of day comes as 22:00:00.
      { from: row.quiet_from.slice(0, 5), to: row.quiet_to.slice(0, 5) }

const awayOf = (
  row: { away_from: Date | null; away_until: Date | null; away_cover: string | null } | undefined,
): SettingsRecord['away'] =>
  row === undefined || row.away_from === null || row.away_until === null
    ? null
    : { from: row.away_from, until: row.away_until, coverUserId: row.away_cover }

async function listRuleChoices(
  db: Kysely<Database>,
  siteId: number,
  userIds: readonly string[],
): Promise<Map<string, Partial<Record<Rule, RuleChannels>>>> {
  const choices = new Map<string, Partial<Record<Rule, RuleChannels>>>()
  if (userIds.length === 0) return choices
  const rows = await db
    .selectFrom('member_rule')
    .where('site_id', '=', siteId)
    .where('user_id', 'in', userIds)
    .select(['user_id', 'rule', 'mail_on', 'push_on'])
    .execute()
  for (const row of rows) {
    // A rule of an older version is not asked of any more.
    const rule = ruleSchema.safeParse(row.rule)
    if (!rule.success) continue
    const channels = { mailOn: row.mail_on, pushOn: row.push_on }
    choices.set(row.user_id, { ...choices.get(row.user_id), [rule.data]: channels })
  }
  return choices
}

/** Stores a change and raises the version. What is not named stays. */
export async function saveSettings(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  change: SettingsChange,
): Promise<void> {
  const { quiet, away, sessionUntil } = change
  const given = {
    unit_system: change.unitSystem,
    mail_on: change.mailOn,
    push_on: change.pushOn,
    on_house_list: change.onHouseList,
    time_zone: change.timeZone,
    digest: change.digest,
    digest_at: change.digestAt,
    digest_weekday: change.digestWeekday,
    session_until: sessionUntil,
    ...(quiet === undefined ? {} : { quiet_from: quiet?.from ?? null, quiet_to: quiet?.to ?? null }),
    ...(away === undefined
      ? {}
      : {
          away_from: away?.from ?? null,
          away_until: away?.until ?? null,
          away_cover: away?.coverUserId ?? null,
        }),
  }
  await db
    .insertInto('member_setting')
    .values({ site_id: siteId, user_id: userId, ...given, version: 2 })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'user_id'])
        .doUpdateSet((eb) => ({ ...given, version: eb('member_setting.version', '+', 1) })),
    )
    .execute()
  for (const [name, channels] of Object.entries(change.rules ?? {})) {
    const rule = ruleSchema.parse(name)
    if (channels === null)
      await db
        .deleteFrom('member_rule')
        .where('site_id', '=', siteId)
        .where('user_id', '=', userId)
        .where('rule', '=', rule)
        .execute()
    else if (channels !== undefined) await saveRuleChoice(db, siteId, userId, rule, channels)
  }
}

async function saveRuleChoice(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  rule: Rule,
  { mailOn, pushOn }: RuleChannels,
): Promise<void> {
  const set = { mail_on: mailOn, push_on: pushOn }
  await db
    .insertInto('member_rule')
    .values({ site_id: siteId, user_id: userId, rule, ...set })
    .onConflict((clash) => clash.columns(['site_id', 'user_id', 'rule']).doUpdateSet(set))
    .execute()
}

export interface PersonSettings {
  userId: string
  name: string
  memberId: string
  role: string
  mailOn: boolean
  onHouseList: boolean
  wishes: PersonWishes
}

/** Everybody of a site with what they chose, in the order in which they joined: that of "tell the next" too. */
export async function listPeopleSettings(db: Kysely<Database>, siteId: number): Promise<PersonSettings[]> {
  const rows = await db
    .selectFrom('site')
    .innerJoin('member', 'member.organizationId', 'site.organization_id')
    .innerJoin('user', 'user.id', 'member.userId')
    .leftJoin('member_setting as setting', (join) =>
      join.onRef('setting.site_id', '=', 'site.id').onRef('setting.user_id', '=', 'member.userId'),
    )
    .where('site.id', '=', siteId)
    .select((eb) => [
      'member.id',
      'member.userId',
      'member.role',
      'user.name',
      'setting.mail_on',
      'setting.on_house_list',
      ...wishColumns,
      eb
        .exists(
          eb
            .selectFrom('push_subscription as phone')
            .whereRef('phone.user_id', '=', 'member.userId')
            .where('phone.gone_at', 'is', null)
            .select('phone.id'),
        )
        .as('has_phone'),
    ])
    .orderBy('member.createdAt')
    .orderBy('member.id')
    .execute()
  const rules = await listRuleChoices(
    db,
    siteId,
    rows.map((row) => row.userId),
  )
  return rows.map((row) => {
    const away = awayOf(row)
    return {
      userId: row.userId,
      name: row.name,
      memberId: row.id,
      role: row.role,
      mailOn: row.mail_on ?? true,
      onHouseList: row.on_house_list ?? false,
      wishes: {
        pushOn: (row.push_on ?? true) && Boolean(row.has_phone),
        rules: rules.get(row.userId) ?? {},
        quiet: quietOf(row),
        timeZone: row.time_zone,
        digest: digestSchema.parse(row.digest ?? usualWishes.digest),
        digestAt: (row.digest_at ?? usualWishes.digestAt).slice(0, 5),
        digestWeekday: row.digest_weekday ?? usualWishes.digestWeekday,
        away:
          away === null
            ? null
            : { from: away.from.getTime(), until: away.until.getTime(), coveredBy: away.coverUserId },
        sessionUntil: row.session_until?.getTime() ?? null,
      },
    }
  })
}

/** Nobody else changes these until the end of the transaction, whether or not they have been stored yet. */
export async function lockSettings(trx: Kysely<Database>, siteId: number, userId: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtext(${`settings ${userId}`}), ${siteId})`.execute(trx)
}
