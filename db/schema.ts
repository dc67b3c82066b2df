import type { ColumnType, Generated, GeneratedAlways, JSONColumnType } from 'kysely'
import type { AccountTables } from './schema-accounts'
import type { NoticeTables } from './schema-notices'
import type { WoodTables } from './schema-wood'

/** The shape of the database, as the migrations leave it. Rows are turned into `lib/` types before they leave `db/`. */

type Instant = ColumnType<Date, Date | string, Date | string>
type InstantDefault = ColumnType<Date, Date | string | undefined, Date | string>
/** A calendar day or a time of day comes back as text: a Date would drag in a time zone. */
type Day = ColumnType<string, string, string>
type TimeOfDay = ColumnType<string, string | undefined, string>

interface SiteTable {
  id: GeneratedAlways<number>
  code: string
  organization_id: string
  name: string
  time_zone: string
  unit_system: Generated<string>
  quiet_from: TimeOfDay
  quiet_to: TimeOfDay
  lock_up_at: TimeOfDay
  is_demo: Generated<boolean>
  scale_step_g: number | null
  version: Generated<number>
  created_at: InstantDefault
}

interface RetiredCodeTable {
  code: string
  retired_at: InstantDefault
}

interface SiteCounterTable {
  site_id: number
  kind:
    | 'room'
    | 'sensor'
    | 'piece'
    | 'carry'
    | 'notice'
    | 'episode'
    | 'wood'
    | 'event'
    | 'weighing'
    | 'outcome'
    | 'repeat'
    | 'door'
  last_id: Generated<number>
}

interface RoomTable {
  site_id: number
  id: number
  code: string
  name: string
  kind: string
  mark: Generated<number>
  is_shared: Generated<boolean>
  keeps_dry_work: Generated<boolean>
  note: Generated<string>
  version: Generated<number>
  created_at: InstantDefault
  archived_at: Instant | null
}

interface ChangeTable {
  site_id: number
  id: GeneratedAlways<number>
  at: InstantDefault
  user_id: string | null
  subject_kind: string
  subject_code: string
  action: string
  before: JSONColumnType<Record<string, unknown>> | null
  after: JSONColumnType<Record<string, unknown>> | null
}

interface SensorTable {
  site_id: number
  id: number
  code: string
  name: string
  kind: Generated<string>
  secret_hash: string | null
  secret_set_at: Instant | null
  version: Generated<number>
  created_at: InstantDefault
  archived_at: Instant | null
}

interface PlacementTable {
  site_id: number
  sensor_id: number
  from_at: Instant
  to_at: Instant | null
  room_id: number
  spot: Generated<string>
}

interface SensorStateTable {
  site_id: number
  sensor_id: number
  at: Instant | null
  temperature_c: number | null
  humidity_pct: number | null
  emc_pct: number | null
  battery_pct: number | null
  heard_at: Instant | null
  is_here: boolean | null
  usual_gap_s: number | null
  clock_not_set_at: Instant | null
  clock_ahead_at: Instant | null
}

interface ReadingTable {
  site_id: number
  sensor_id: number
  at: Instant
  temperature_c: number
  humidity_pct: number
}

interface FigureColumns {
  site_id: number
  room_id: number
  sensor_id: number
  n: number
  temperature_milli_sum: number
  temperature_c_min: number
  temperature_c_max: number
  humidity_milli_sum: number
  humidity_pct_min: number
  humidity_pct_max: number
  emc_milli_sum: number
  emc_pct_min: number
  emc_pct_max: number
}

interface RoomHourTable extends FigureColumns {
  hour_at: Instant
}

interface RoomDayTable extends FigureColumns {
  day_on: Day
}

interface RefusedTable {
  site_id: number
  id: GeneratedAlways<number>
  sensor_id: number | null
  at: InstantDefault
  topic: string
  reason: string
  field: string | null
  detail: Generated<string>
  size_bytes: number
  head_hex: string
}

interface IngestCountTable {
  site_id: number
  sensor_id: number
  day_on: Day
  kind: string
  n: number
}

interface StrayCountTable {
  day_on: Day
  kind: string
  n: number
}

interface HeartbeatTable {
  part: string
  at: Instant
  detail: ColumnType<Record<string, unknown>, string | undefined, string>
}

interface PieceTable {
  site_id: number
  id: number
  code: string
  number: string
  stage: string
  wood: string | null
  wood_kind: Generated<string>
  grain: Generated<string>
  spigot_on: Generated<string>
  lid_form: Generated<string>
  joint_diameter_mm: number | null
  wall_mm: number | null
  spigot_mm: number | null
  lid_mm: number | null
  body_wall_mm: number | null
  fit_grade: string | null
  clearance_mm: number | null
  allowance_mm: number | null
  finish: Generated<string>
  keep_room_id: number | null
  fitted_room_id: number | null
  fitted_on: ColumnType<string | null, string | null | undefined, string | null>
  fitted_at: Instant | null
  fit_mc_pct: number | null
  fit_lid_mc_pct: number | null
  lid_wall_mm: number | null
  blank_diameter_mm: number | null
  ends_sealed: Generated<boolean>
  roughed_on: ColumnType<string | null, string | null | undefined, string | null>
  ready_by_weight: Generated<boolean>
  note: Generated<string>
  owner_user_id: string | null
  is_private: Generated<boolean>
  is_shared: Generated<boolean>
  version: Generated<number>
  created_at: InstantDefault
  archived_at: Instant | null
}

interface CarryTable {
  site_id: number
  id: number
  code: string
  state: string
  to_room_id: number
  cover: string
  planned_at: Instant
  stay_minutes: number
  started_at: Instant | null
  ended_at: Instant | null
  against_advice: Generated<boolean>
  note: Generated<string>
  created_by: string | null
  created_at: InstantDefault
  takes_whatever: Generated<boolean>
  repeat_id: ColumnType<number | null, number | null | undefined, number | null>
  repeat_on: ColumnType<string | null, string | null | undefined, string | null>
  put_off_from: ColumnType<Date | null, Date | string | null | undefined, Date | string | null>
  put_off_at: ColumnType<Date | null, Date | string | null | undefined, Date | string | null>
  version: Generated<number>
}

interface CarryPieceTable {
  site_id: number
  carry_id: number
  piece_id: number
  from_room_id: number | null
  cover: string
  out_at: Instant | null
  back_at: Instant | null
  back_room_id: number | null
  ask_skipped_at: ColumnType<Date | null, Date | string | null | undefined, Date | string | null>
}

interface PiecePlaceTable {
  site_id: number
  piece_id: number
  from_at: Instant
  to_at: Instant | null
  room_id: number
  cover: Generated<string>
  carry_id: number | null
  moved_by: string | null
}

interface IdempotencyTable {
  user_id: string
  key: string
  request_hash: string
  status: number | null
  body: ColumnType<unknown, string | null | undefined, string | null>
  headers: ColumnType<Record<string, string> | null, string | null | undefined, string | null>
  created_at: InstantDefault
}

interface RateCountTable {
  key: string
  window_at: Instant
  n: number
}

interface DemoMailTable {
  id: GeneratedAlways<number>
  at: InstantDefault
  message_id: Generated<string>
  sender: string
  recipients: string[]
  subject: string
  text_body: string
  html_body: string
}

export interface Database extends AccountTables, NoticeTables, WoodTables {
  site: SiteTable
  retired_code: RetiredCodeTable
  site_counter: SiteCounterTable
  room: RoomTable
  change: ChangeTable
  sensor: SensorTable
  placement: PlacementTable
  sensor_state: SensorStateTable
  reading: ReadingTable
  room_hour: RoomHourTable
  room_day: RoomDayTable
  refused: RefusedTable
  ingest_count: IngestCountTable
  stray_count: StrayCountTable
  heartbeat: HeartbeatTable
  piece: PieceTable
  carry: CarryTable
  carry_piece: CarryPieceTable
  piece_place: PiecePlaceTable
  idempotency: IdempotencyTable
  rate_count: RateCountTable
  demo_mail: DemoMailTable
}
