import { type Kysely, sql } from 'kysely'

/**
 * Sensors, where they hang and when, readings by month, the figures made from them, and what could not be used.
 * The site stands first in every key, so that no row can point across sites.
 */
const statements = [
  `create table sensor (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    name text not null check (length(name) between 1 and 60),
    kind text not null default 'device' check (kind in ('device', 'typed')),
    secret_hash text,
    secret_set_at timestamptz,
    version integer not null default 1,
    created_at timestamptz not null default now(),
    archived_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    check ((kind = 'device') = (secret_hash is not null))
  )`,
  `create unique index sensor_name_idx on sensor (site_id, lower(name)) where archived_at is null`,
  `create table placement (
    site_id integer not null,
    sensor_id integer not null,
    from_at timestamptz not null,
    to_at timestamptz check (to_at > from_at),
    room_id integer not null,
    spot text not null default '' check (length(spot) <= 200),
    primary key (site_id, sensor_id, from_at),
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade,
    foreign key (site_id, room_id) references room (site_id, id) on delete cascade
  )`,
  `create unique index placement_current_idx on placement (site_id, sensor_id) where to_at is null`,
  `create index placement_room_idx on placement (site_id, room_id)`,
  // One row per sensor, overwritten all day: kept apart from sensor, and half filled, so that updates stay in the page.
  `create table sensor_state (
    site_id integer not null,
    sensor_id integer not null,
    at timestamptz,
    temperature_c real,
    humidity_pct real,
    emc_pct real,
    battery_pct real,
    heard_at timestamptz,
    is_here boolean,
    usual_gap_s real,
    clock_not_set_at timestamptz,
    clock_ahead_at timestamptz,
    primary key (site_id, sensor_id),
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade
  ) with (fillfactor = 50)`,
  // A comparison with NaN is true for "greater than" in PostgreSQL, so the upper bound refuses it.
  `create table reading (
    site_id integer not null,
    sensor_id integer not null,
    at timestamptz not null,
    temperature_c real not null check (temperature_c >= -40 and temperature_c <= 80),
    humidity_pct real not null check (humidity_pct >= 0 and humidity_pct <= 100),
    primary key (site_id, sensor_id, at),
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade
  ) partition by range (at)`,
  ...['room_hour', 'room_day'].map((table) => {
    const bucket = table === 'room_hour' ? 'hour_at timestamptz not null' : 'day_on date not null'
    const key = table === 'room_hour' ? 'hour_at' : 'day_on'
    return `create table ${table} (
      site_id integer not null,
      room_id integer not null,
      sensor_id integer not null,
      ${bucket},
      n integer not null check (n > 0),
      temperature_milli_sum bigint not null,
      temperature_c_min real not null,
      temperature_c_max real not null,
      humidity_milli_sum bigint not null,
      humidity_pct_min real not null,
      humidity_pct_max real not null,
      emc_milli_sum bigint not null,
      emc_pct_min real not null,
      emc_pct_max real not null,
      primary key (site_id, room_id, ${key}, sensor_id),
      foreign key (site_id, room_id) references room (site_id, id) on delete cascade,
      foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade
    ) with (fillfactor = 80)`
  }),
  `create table refused (
    site_id integer not null references site (id) on delete cascade,
    id bigint generated always as identity,
    sensor_id integer,
    at timestamptz not null default now(),
    topic text not null,
    reason text not null,
    field text,
    detail text not null default '',
    size_bytes integer not null,
    head_hex text not null check (length(head_hex) <= 128),
    primary key (site_id, id),
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade
  )`,
  `create index refused_at_idx on refused (site_id, at desc, id desc)`,
  `create table ingest_count (
    site_id integer not null references site (id) on delete cascade,
    sensor_id integer not null,
    day_on date not null,
    kind text not null,
    n bigint not null,
    primary key (site_id, sensor_id, day_on, kind),
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade
  )`,
  // Messages that no site can be named for: only counted.
  `create table stray_count (
    day_on date not null,
    kind text not null,
    n bigint not null,
    primary key (day_on, kind)
  )`,
  // Every part says here that it is alive, so that health can be read without reaching into other processes.
  `create table heartbeat (
    part text primary key,
    at timestamptz not null,
    detail jsonb not null default '{}'
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  const tables = [
    'heartbeat',
    'stray_count',
    'ingest_count',
    'refused',
    'room_day',
    'room_hour',
    'reading',
    'sensor_state',
    'placement',
    'sensor',
  ]
  for (const table of tables) await sql.raw(`drop table ${table}`).execute(db)
}
