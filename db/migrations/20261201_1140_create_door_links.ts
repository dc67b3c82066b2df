import { type Kysely, sql } from 'kysely'

/** Links that open the view by the shop's door without an account. Only a hash of each is kept. */
const statement = `create table door_link (
  site_id integer not null references site (id) on delete cascade,
  id integer not null,
  code text not null,
  name text not null check (length(name) between 1 and 60),
  -- The room whose hours it shows.
  room_id integer not null,
  token_hash text not null unique,
  created_by text references "user" (id) on delete set null,
  created_at timestamptz not null default now(),
  last_seen_at timestamptz,
  revoked_at timestamptz,
  primary key (site_id, id),
  unique (site_id, code),
  foreign key (site_id, room_id) references room (site_id, id)
)`

export async function up(db: Kysely<unknown>): Promise<void> {
  await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql.raw('drop table door_link').execute(db)
}
