import { type Kysely, sql } from 'kysely'

/** What was forecast for a room, hour by hour, and how far off it was beside the two simplest forecasts. */
const statements = [
  `create table forecast (
    site_id integer not null references site (id) on delete cascade,
    room_id integer not null,
    -- The whole hour that it was made at; its first hour begins then.
    made_at timestamptz not null,
    -- Columns of 48 hours, and what was used: the room's own record, same as now, or same as yesterday.
    data jsonb not null,
    primary key (site_id, room_id, made_at),
    foreign key (site_id, room_id) references room (site_id, id) on delete cascade
  )`,
  `create index forecast_made_idx on forecast (made_at)`,
  `create table forecast_score (
    site_id integer not null references site (id) on delete cascade,
    room_id integer not null,
    made_at timestamptz not null,
    lead_h smallint not null check (lead_h between 1 and 48),
    -- EMC as it was read later, and as each way had told it, % MC.
    emc_pct real not null,
    record_pct real not null,
    same_as_now_pct real not null,
    -- Null where yesterday had no such hour.
    yesterday_pct real,
    primary key (site_id, room_id, made_at, lead_h),
    foreign key (site_id, room_id) references room (site_id, id) on delete cascade
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['forecast_score', 'forecast']) await sql.raw(`drop table ${table}`).execute(db)
}
