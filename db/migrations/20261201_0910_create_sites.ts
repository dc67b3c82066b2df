import { type Kysely, sql } from 'kysely'

/**
 * Sites, their counters, rooms, and each member's own wishes.
 * Inside the database a site's things have small integers, unique within the site; outside only the opaque code is seen.
 */
const statements = [
  `create table site (
    id integer generated always as identity primary key,
    code text not null unique,
    organization_id text not null unique references organization (id) on delete cascade,
    name text not null check (length(name) between 1 and 80),
    time_zone text not null,
    unit_system text not null default 'metric' check (unit_system in ('metric', 'imperial')),
    quiet_from time not null default '22:00',
    quiet_to time not null default '07:00',
    lock_up_at time not null default '18:00',
    is_demo boolean not null default false,
    version integer not null default 1,
    created_at timestamptz not null default now()
  )`,
  // Codes stand in MQTT topics, so a code that was once used is never given out again, even after deletion.
  `create table retired_code (
    code text primary key,
    retired_at timestamptz not null default now()
  )`,
  `create table site_counter (
    site_id integer not null references site (id) on delete cascade,
    kind text not null check (kind in ('room', 'sensor', 'piece', 'carry', 'notice', 'episode')),
    last_id integer not null default 0,
    primary key (site_id, kind)
  )`,
  `create table member_setting (
    site_id integer not null references site (id) on delete cascade,
    user_id text not null references "user" (id) on delete cascade,
    unit_system text check (unit_system in ('metric', 'imperial')),
    mail_on boolean not null default true,
    on_house_list boolean not null default false,
    last_here_at timestamptz,
    version integer not null default 1,
    primary key (site_id, user_id)
  )`,
  `create table room (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    name text not null check (length(name) between 1 and 60),
    kind text not null check (kind in ('cupboard', 'house', 'shop', 'store', 'tub', 'van', 'outdoor')),
    mark smallint not null default 0,
    is_shared boolean not null default false,
    keeps_dry_work boolean not null default false,
    note text not null default '' check (length(note) <= 2000),
    version integer not null default 1,
    created_at timestamptz not null default now(),
    archived_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code)
  )`,
  `create unique index room_name_idx on room (site_id, lower(name)) where archived_at is null`,
  // Who changed what, when. "before" and "after" hold the changed fields only, so that a change can be undone.
  `create table change (
    site_id integer not null references site (id) on delete cascade,
    id bigint generated always as identity,
    at timestamptz not null default now(),
    user_id text references "user" (id) on delete set null,
    subject_kind text not null,
    subject_code text not null,
    action text not null,
    before jsonb,
    after jsonb,
    primary key (site_id, id)
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['change', 'room', 'member_setting', 'site_counter', 'retired_code', 'site'])
    await sql.raw(`drop table ${table}`).execute(db)
}
