import 'server-only'
import type { Kysely } from 'kysely'
import { assumedKeepRoom } from '@/db/queries/carry-inputs'
import { insertChange } from '@/db/queries/changes'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import {
  listOutingsSince,
  listRestingPieces,
  listRoomDays,
  listRoomHourAirs,
  listShopUse,
  listSilences,
} from '@/db/queries/notice-inputs'
import { listRoomRecords } from '@/db/queries/rooms'
import {
  listRuleChanges,
  listRuleRecords,
  listToldMoments,
  lockRule,
  type RuleChange,
  type RuleRecord,
  upsertRule,
} from '@/db/queries/rules'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { type PreviewHistory, previewDays, previewRule, recordDays } from '@/lib/notices/preview'
import { previewWords } from '@/lib/notices/preview-words'
import { type RuleChoice, ruleForms, settingsSchemaOf, type ToldRule } from '@/lib/notices/rule-settings'
import {
  changedValues,
  type RuleChangeRequest,
  type RuleList,
  ruleOrder,
  type RulePreview,
  type RuleView,
  ruleView,
} from '@/lib/notices/rule-view'
import type { NoticeRoom } from '@/lib/notices/surroundings'
import { ok } from '@/lib/result'
import { fail, failField, type Outcome } from './problem'

/** Every rule of a site, in words, with what can be changed of it. */
export async function listRules(db: Kysely<Database>, member: SiteMember): Promise<RuleList> {
  const [records, changes, rooms] = await Promise.all([
    listRuleRecords(db, member.siteId),
    listRuleChanges(db, member.siteId),
    listRoomRecords(db, member.siteId),
  ])
  return {
    items: ruleOrder.map((rule) => viewOf(member, rule, records, changes)),
    rooms: rooms.map(({ code, name }) => ({ id: code, name })),
  }
}

function viewOf(
  member: SiteMember,
  rule: ToldRule,
  records: readonly RuleRecord[],
  changes: readonly RuleChange[],
): RuleView {
  const change = changes.find((one) => one.rule === rule)
  return ruleView(
    rule,
    records.find((record) => record.rule === rule),
    member.site,
    change === undefined
      ? null
      : {
          at: change.at.toISOString(),
          by: change.userName,
          canUndo: choiceBefore(rule, change) !== undefined,
        },
  )
}

async function getRule(db: Kysely<Database>, member: SiteMember, rule: ToldRule): Promise<RuleView> {
  const { items } = await listRules(db, member)
  const found = items.find((one) => one.rule === rule)
  if (found === undefined) throw new RangeError(`no rule ${rule}`)
  return found
}

/** Switches a rule, or changes words of its sentence. The words that are not named stay as they are. */
export async function changeRule(
  db: Kysely<Database>,
  member: SiteMember,
  version: number,
  change: RuleChangeRequest,
  now: Date,
): Promise<Outcome<RuleView>> {
  const { rule } = change
  const parsed = settingsSchemaOf(rule).safeParse(change.settings ?? {})
  if (!parsed.success) {
    const [issue] = parsed.error.issues
    return failField('not-possible', ['settings', ...(issue?.path ?? [])].join('.'), issue?.message ?? '')
  }
  const refusal = await refusedRooms(db, member, change.settings)
  if (refusal !== undefined) return refusal
  return inTransaction(db, async (trx) => {
    const own = await lockRule(trx, member.siteId, rule)
    const before = own ?? asItComes(rule)
    const after: RuleChoice = {
      isOn: change.isOn ?? before.isOn,
      settings: changedValues(rule, { ...before.settings, ...parsed.data }),
    }
    return storeRule(trx, member, { rule, version, before, after, action: 'change' }, now)
  })
}

const asItComes = (rule: ToldRule): RuleChoice => ({ isOn: ruleForms[rule].isOn, settings: {} })

/** Rooms that are named must be rooms of this site. */
async function refusedRooms(
  db: Kysely<Database>,
  member: SiteMember,
  settings: RuleChangeRequest['settings'],
) {
  const named = settings?.rooms
  if (!Array.isArray(named) || named.length === 0) return undefined
  const rooms = await listRoomRecords(db, member.siteId)
  return named.every((code) => rooms.some((room) => room.code === code))
    ? undefined
    : failField('not-possible', 'settings.rooms', 'there is no such room here')
}

async function storeRule(
  db: Kysely<Database>,
  member: SiteMember,
  change: { rule: ToldRule; version: number; before: RuleChoice; after: RuleChoice; action: string },
  now: Date,
): Promise<Outcome<RuleView>> {
  const { rule, version, before, after, action } = change
  const stored = await upsertRule(db, member.siteId, { ...after, rule, version, userId: member.userId }, now)
  if (stored === undefined) {
    const current = await getRule(db, member, rule)
    return fail('changed-meanwhile', 'Somebody changed this rule meanwhile. Look at it again.', {
      current,
      version: current.version,
    })
  }
  await insertChange(db, member.siteId, {
    userId: member.userId,
    subjectKind: 'rule',
    subjectCode: rule,
    action,
    before: { isOn: before.isOn, settings: before.settings },
    after: { isOn: after.isOn, settings: after.settings },
  })
  await notifySite(db, member.siteId, 'notice', rule)
  return ok(await getRule(db, member, rule))
}

/** Sets a rule back to what it was before its last change; undone again, it is as it was. */
export async function undoRule(
  db: Kysely<Database>,
  member: SiteMember,
  version: number,
  rule: ToldRule,
  now: Date,
): Promise<Outcome<RuleView>> {
  return inTransaction(db, async (trx) => {
    const own = await lockRule(trx, member.siteId, rule)
    const change = (await listRuleChanges(trx, member.siteId)).find((one) => one.rule === rule)
    const after = change && choiceBefore(rule, change)
    if (own === undefined || after === undefined)
      return fail('not-possible', 'Nothing has been changed of this rule.')
    return storeRule(trx, member, { rule, version, before: own, after, action: 'undo' }, now)
  })
}

/** What a rule went by before a change; undefined where the record of it can't be read any more. */
function choiceBefore(rule: ToldRule, { before }: RuleChange): RuleChoice | undefined {
  if (typeof before !== 'object' || before === null || !('isOn' in before) || !('settings' in before))
    return undefined
  const settings = settingsSchemaOf(rule).safeParse(before.settings)
  return settings.success && typeof before.isOn === 'boolean'
    ? { isOn: before.isOn, settings: changedValues(rule, settings.data) }
    : undefined
}

/** When a rule would have told something in the last 90 days, with the words as they are asked about. */
export async function previewOfRule(
  db: Kysely<Database>,
  member: SiteMember,
  asked: { rule: ToldRule; settings?: RuleChangeRequest['settings'] },
  now: Date,
): Promise<Outcome<RulePreview>> {
  const parsed = settingsSchemaOf(asked.rule).safeParse(asked.settings ?? {})
  if (!parsed.success) {
    const [issue] = parsed.error.issues
    return failField('not-possible', ['settings', ...(issue?.path ?? [])].join('.'), issue?.message ?? '')
  }
  const own = (await listRuleRecords(db, member.siteId)).find(({ rule }) => rule === asked.rule)
  const history = await loadHistory(db, member, asked.rule, now)
  const preview = previewRule(asked.rule, { ...own?.settings, ...parsed.data }, history)
  const today = dayOfInstant(now, member.timeZone)
  const days = history.rooms.length === 0 ? previewDays : recordDays(history.rooms, today)
  return ok({
    rule: asked.rule,
    by: preview.by,
    words: previewWords(preview, days),
    from: new Date(now.getTime() - previewDays * dayMs).toISOString(),
    to: now.toISOString(),
    moments: preview.moments.map(({ at, of }) => ({ at: new Date(at).toISOString(), of })),
  })
}

const dayMs = 24 * 3_600_000
/** A year and a season before the 90 days, for what a day is held against. */
const daysBack = 90 + 460

/** Only what the rule looks at is loaded. */
async function loadHistory(
  db: Kysely<Database>,
  member: SiteMember,
  rule: ToldRule,
  now: Date,
): Promise<PreviewHistory> {
  const { siteId, timeZone, site } = member
  const since = new Date(now.getTime() - (previewDays + 1) * dayMs)
  const nothing: PreviewHistory = {
    now: now.getTime(),
    site: { timeZone, quietFrom: site.quietFrom, quietTo: site.quietTo, lockUpAt: site.lockUpAt },
    rooms: [],
    silences: [],
    outings: [],
    shopUse: new Map(),
    told: [],
  }
  if (ruleForms[rule].replay === 'told') {
    const told = await listToldMoments(db, siteId, rule, since)
    return { ...nothing, told: told.map(({ at, title }) => ({ at: at.getTime(), title })) }
  }
  if (rule === 'sensor-silent') {
    const silences = await listSilences(db, siteId, since, now)
    return {
      ...nothing,
      silences: silences.map(({ fromAt, untilAt, ...of }) => ({
        ...of,
        fromAt: fromAt.getTime(),
        untilAt: untilAt?.getTime() ?? null,
      })),
    }
  }
  if (rule === 'lock-up' || rule === 'last-call') {
    const [outings, shopUse] = await Promise.all([
      listOutingsSince(db, siteId, since),
      listShopUse(db, member, since, now),
    ])
    return {
      ...nothing,
      shopUse,
      outings: outings.map(({ number, outAt, backAt }) => ({
        number,
        outAt: outAt.getTime(),
        backAt: backAt?.getTime() ?? null,
      })),
    }
  }
  return { ...nothing, rooms: await loadRooms(db, member, rule, since, now) }
}

async function loadRooms(
  db: Kysely<Database>,
  member: SiteMember,
  rule: ToldRule,
  since: Date,
  now: Date,
): Promise<NoticeRoom[]> {
  const { siteId, timeZone } = member
  const today = dayOfInstant(now, timeZone)
  const [rooms, pieces, days, hours] = await Promise.all([
    listRoomRecords(db, siteId),
    listRestingPieces(db, siteId),
    listRoomDays(db, member, daysAfter(today, -daysBack), today),
    rule === 'cold-iron' ? listRoomHourAirs(db, siteId, since, now) : new Map<number, never[]>(),
  ])
  const assumed = assumedKeepRoom(rooms)?.id
  return rooms.map((room) => ({
    code: room.code,
    name: room.name,
    kind: room.kind,
    keepsDryWork: room.keepsDryWork,
    isKeepRoom: room.id === assumed || pieces.some((piece) => piece.keepRoomId === room.id),
    hasRestingWood: pieces.some((piece) => piece.roomId === room.id && piece.stage !== 'box'),
    days: days.get(room.id) ?? [],
    hours: hours.get(room.id) ?? [],
  }))
}
