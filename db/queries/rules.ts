import type { Kysely } from 'kysely'
import type { RuleBook, RuleChoice, RuleValue, ToldRule } from '@/lib/notices/rule-settings'
import type { Database } from '../schema'

/** A rule's row: what the site has changed of it. */
export interface RuleRecord extends RuleChoice {
  rule: string
  version: number
}

const recordOf = (row: { rule: string; is_on: boolean; settings: unknown; version: number }): RuleRecord => ({
  rule: row.rule,
  isOn: row.is_on,
  // Each value is held against its own range where it is read (`valuesOf`); here it only has to be an object.
  settings:
    typeof row.settings === 'object' && row.settings !== null
      ? (row.settings as Record<string, RuleValue>)
      : {},
  version: row.version,
})

/** What a site has changed of its rules; a rule without a row is as it comes. */
export async function listRuleRecords(db: Kysely<Database>, siteId: number): Promise<RuleRecord[]> {
  const rows = await db
    .selectFrom('rule')
    .where('site_id', '=', siteId)
    .select(['rule', 'is_on', 'settings', 'version'])
    .execute()
  return rows.map(recordOf)
}

export async function loadRuleBook(db: Kysely<Database>, siteId: number): Promise<RuleBook> {
  return new Map((await listRuleRecords(db, siteId)).map((record) => [record.rule, record]))
}

/** Locks a rule's row for the rest of the transaction; undefined where it is as it comes. */
export async function lockRule(
  db: Kysely<Database>,
  siteId: number,
  rule: ToldRule,
): Promise<RuleRecord | undefined> {
  const row = await db
    .selectFrom('rule')
    .where('site_id', '=', siteId)
    .where('rule', '=', rule)
    .select(['rule', 'is_on', 'settings', 'version'])
    .forUpdate()
    .executeTakeFirst()
  return row === undefined ? undefined : recordOf(row)
}

/**
 * Stores what a rule goes by from now on, if it is still at the version that the writer saw: 1 for one without a row.
 * @returns the new version; undefined when somebody was quicker
 */
export async function upsertRule(
  db: Kysely<Database>,
  siteId: number,
  change: RuleChoice & { rule: ToldRule; version: number; userId: string },
  now: Date,
): Promise<number | undefined> {
  const row = await db
    .insertInto('rule')
    .values({
      site_id: siteId,
      rule: change.rule,
      is_on: change.isOn,
      settings: JSON.stringify(change.settings),
      version: change.version + 1,
      changed_at: now,
      changed_by: change.userId,
    })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'rule'])
        .doUpdateSet((eb) => ({
          is_on: eb.ref('excluded.is_on'),
          settings: eb.ref('excluded.settings'),
          version: eb.ref('excluded.version'),
          changed_at: eb.ref('excluded.changed_at'),
          changed_by: eb.ref('excluded.changed_by'),
        }))
        .where('rule.version', '=', change.version),
    )
    .returning('version')
    .executeTakeFirst()
  return row?.version
}

/** The last change of each rule: who, when, and what it was before. */
export interface RuleChange {
  rule: string
  at: Date
  userName: string | null
  before: unknown
}

export async function listRuleChanges(db: Kysely<Database>, siteId: number): Promise<RuleChange[]> {
  const rows = await db
    .selectFrom('change')
    .leftJoin('user', 'user.id', 'change.user_id')
    .where('change.site_id', '=', siteId)
    .where('change.subject_kind', '=', 'rule')
    .distinctOn('change.subject_code')
    .select(['change.subject_code', 'change.at', 'change.before', 'user.name'])
    .orderBy('change.subject_code')
    .orderBy('change.id', 'desc')
    .execute()
  return rows.map((row) => ({ rule: row.subject_code, at: row.at, userName: row.name, before: row.before }))
}

/** When a rule was told, from the episodes on record, oldest first. */
export async function listToldMoments(
  db: Kysely<Database>,
  siteId: number,
  rule: ToldRule,
  since: Date,
): Promise<{ at: Date; title: string }[]> {
  return db
    .selectFrom('notice')
    .where('site_id', '=', siteId)
    .where('rule', '=', rule)
    .where('at', '>', since)
    .select(['at', 'title'])
    .orderBy('at')
    .execute()
}
