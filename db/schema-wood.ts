import type { ColumnType, Generated } from 'kysely'

/** The part of the database's shape that the wood model lives on: woods, events, weighings, followed moisture. */

type Instant = ColumnType<Date, Date | string, Date | string>
type InstantDefault = ColumnType<Date, Date | string | undefined, Date | string>
/** Parsed by the driver on the way out, given as text on the way in. */
type Json<T> = ColumnType<T, string, string>

interface SiteWoodTable {
  site_id: number
  id: number
  code: string
  overrides: string | null
  common_name: string
  latin_name: Generated<string>
  movement_class: Generated<string>
  radial_per_pct: number | null
  tangential_per_pct: number | null
  density_kg_m3: number | null
  source: Generated<string>
  note: Generated<string>
  version: Generated<number>
  created_at: InstantDefault
  archived_at: Instant | null
}

interface PieceEventTable {
  site_id: number
  id: number
  code: string
  piece_id: number
  kind: string
  at: Instant
  room_id: number | null
  data: ColumnType<unknown, string | undefined, string>
  note: Generated<string>
  user_id: string | null
  created_at: InstantDefault
  undone_at: Instant | null
}

interface WeighingTable {
  site_id: number
  id: number
  code: string
  piece_id: number
  at: Instant
  grams: number
  step_g: number | null
  note: Generated<string>
  user_id: string | null
  created_at: InstantDefault
  undone_at: Instant | null
}

interface PieceMoistureTable {
  site_id: number
  piece_id: number
  at: Instant
  state: Json<unknown>
  out_at: Instant | null
  out_state: ColumnType<unknown, string | null | undefined, string | null>
  piece_key: string
  air_key: string
  made_at: InstantDefault
}

interface OutcomeTable {
  site_id: number
  id: number
  code: string
  piece_id: number
  carry_id: number | null
  at: Instant
  turned: string
  movement_class: string
  used_slow: number | null
  used_middle: number | null
  used_fast: number | null
  note: Generated<string>
  user_id: string | null
  created_at: InstantDefault
  undone_at: Instant | null
}

export interface WoodTables {
  site_wood: SiteWoodTable
  piece_event: PieceEventTable
  weighing: WeighingTable
  piece_moisture: PieceMoistureTable
  outcome: OutcomeTable
}
