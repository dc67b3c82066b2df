import type { ColumnType, Generated, GeneratedAlways } from 'kysely'

/** The part of the database's shape that forecasts, repeated plans, rules and what is told live on. */

type Instant = ColumnType<Date, Date | string, Date | string>
type InstantDefault = ColumnType<Date, Date | string | undefined, Date | string>
type InstantOrNull = ColumnType<Date | null, Date | string | null | undefined, Date | string | null>
type TimeOfDay = ColumnType<string, string | undefined, string>
type TimeOfDayOrNull = ColumnType<string | null, string | null | undefined, string | null>
/** Parsed by the driver on the way out, given as text on the way in. */
type Json = ColumnType<unknown, string | undefined, string>

interface ForecastTable {
  site_id: number
  room_id: number
  made_at: Instant
  data: Json
}

interface ForecastScoreTable {
  site_id: number
  room_id: number
  made_at: Instant
  lead_h: number
  emc_pct: number
  record_pct: number
  same_as_now_pct: number
  yesterday_pct: number | null
}

interface CarryRepeatTable {
  site_id: number
  id: number
  code: string
  to_room_id: number
  cover: string
  weekdays: number[]
  at_time: TimeOfDay
  stay_minutes: number
  takes_whatever: Generated<boolean>
  note: Generated<string>
  created_by: string | null
  created_at: InstantDefault
  paused_at: InstantOrNull
  ended_at: InstantOrNull
  version: Generated<number>
}

interface CarryRepeatPieceTable {
  site_id: number
  repeat_id: number
  piece_id: number
}

interface LockUpTable {
  site_id: number
  day_on: ColumnType<string, string, string>
  nothing_else_at: InstantOrNull
  nothing_else_by: ColumnType<string | null, string | null | undefined, string | null>
  closed_at: InstantOrNull
  closed_by: ColumnType<string | null, string | null | undefined, string | null>
}

interface EpisodeTable {
  site_id: number
  id: number
  rule: string
  subject: string
  key: string
  state: string
  began_at: Instant
  told_at: Instant | null
  ended_at: Instant | null
  data: ColumnType<Record<string, unknown>, string | undefined, string>
}

interface NoticeTable {
  site_id: number
  id: number
  code: string
  episode_id: number | null
  key: string
  rule: string
  urgency: string
  mark: string
  title: string
  body: Generated<string>
  link: Generated<string>
  carry_id: number | null
  piece_id: number | null
  sensor_id: number | null
  room_id: number | null
  at: Instant
  acknowledged_at: Instant | null
  acknowledged_by: string | null
}

interface NoticeSeenTable {
  site_id: number
  notice_id: number
  user_id: string
  seen_at: Instant
}

interface NoticeAnswerTable {
  site_id: number
  id: GeneratedAlways<number>
  notice_id: number
  user_id: string
  answer: string
  at: Instant
  until: InstantOrNull
  via: string
}

interface DeliveryTable {
  site_id: number
  notice_id: number
  user_id: string
  channel: string
  message_id: string
  state: string
  hold_until: Instant | null
  tries: Generated<number>
  sent_at: Instant | null
  last_error: string | null
}

interface DeliveryTryTable {
  site_id: number
  id: GeneratedAlways<number>
  notice_id: number
  user_id: string
  channel: string
  at: Instant
  outcome: string
  detail: Generated<string>
}

interface PushSubscriptionTable {
  id: GeneratedAlways<number>
  user_id: string
  endpoint: string
  p256dh: string
  auth: string
  device: Generated<string>
  created_at: InstantDefault
  last_sent_at: InstantOrNull
  gone_at: InstantOrNull
}

interface MemberSettingTable {
  site_id: number
  user_id: string
  unit_system: string | null
  mail_on: Generated<boolean>
  push_on: Generated<boolean>
  on_house_list: Generated<boolean>
  quiet_from: TimeOfDayOrNull
  quiet_to: TimeOfDayOrNull
  time_zone: ColumnType<string | null, string | null | undefined, string | null>
  digest: Generated<string>
  digest_at: TimeOfDay
  digest_weekday: Generated<number>
  away_from: InstantOrNull
  away_until: InstantOrNull
  away_cover: ColumnType<string | null, string | null | undefined, string | null>
  session_until: InstantOrNull
  last_here_at: Instant | null
  version: Generated<number>
}

interface MemberRuleTable {
  site_id: number
  user_id: string
  rule: string
  mail_on: boolean
  push_on: boolean
}

interface RuleTable {
  site_id: number
  rule: string
  is_on: boolean
  settings: Json
  version: Generated<number>
  changed_at: InstantDefault
  changed_by: string | null
}

interface UsedLinkTable {
  link_id: string
  expires_at: Instant
}

interface DoorLinkTable {
  site_id: number
  id: number
  code: string
  name: string
  room_id: number
  token_hash: string
  created_by: string | null
  created_at: InstantDefault
  last_seen_at: InstantOrNull
  revoked_at: InstantOrNull
}

export interface NoticeTables {
  forecast: ForecastTable
  forecast_score: ForecastScoreTable
  carry_repeat: CarryRepeatTable
  carry_repeat_piece: CarryRepeatPieceTable
  lock_up: LockUpTable
  episode: EpisodeTable
  notice: NoticeTable
  notice_seen: NoticeSeenTable
  notice_answer: NoticeAnswerTable
  delivery: DeliveryTable
  delivery_try: DeliveryTryTable
  push_subscription: PushSubscriptionTable
  member_setting: MemberSettingTable
  member_rule: MemberRuleTable
  rule: RuleTable
  used_link: UsedLinkTable
  door_link: DoorLinkTable
}
