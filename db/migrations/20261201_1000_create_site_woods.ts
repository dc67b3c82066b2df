import { type Kysely, sql } from 'kysely'

/** Woods of a site's own, and its own figures for woods of the table. */
const statements = [
  `alter table site_counter drop constraint site_counter_kind_check`,
  `alter table site_counter add constraint site_counter_kind_check
    check (kind in ('room', 'sensor', 'piece', 'carry', 'notice', 'episode', 'wood', 'event', 'weighing', 'outcome'))`,
  `create table site_wood (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    -- The wood of the table that these figures stand for; null for a wood of the site's own.
    overrides text,
    common_name text not null check (length(common_name) between 1 and 60),
    latin_name text not null default '' check (length(latin_name) <= 80),
    movement_class text not null default 'medium' check (movement_class in ('small', 'medium', 'large')),
    radial_per_pct real check (radial_per_pct > 0 and radial_per_pct <= 0.01),
    tangential_per_pct real check (tangential_per_pct > 0 and tangential_per_pct <= 0.01),
    density_kg_m3 real check (density_kg_m3 between 200 and 1400),
    source text not null default '' check (length(source) <= 300),
    note text not null default '' check (length(note) <= 1000),
    version integer not null default 1,
    created_at timestamptz not null default now(),
    archived_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    check ((radial_per_pct is null) = (tangential_per_pct is null))
  )`,
  `create unique index site_wood_overrides_idx on site_wood (site_id, overrides)
    where overrides is not null and archived_at is null`,
  `create unique index site_wood_name_idx on site_wood (site_id, lower(common_name))
    where overrides is null and archived_at is null`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql.raw(`drop table site_wood`).execute(db)
  await sql.raw(`delete from site_counter where kind in ('wood', 'event', 'weighing', 'outcome')`).execute(db)
  await sql.raw(`alter table site_counter drop constraint site_counter_kind_check`).execute(db)
  await sql
    .raw(
      `alter table site_counter add constraint site_counter_kind_check
        check (kind in ('room', 'sensor', 'piece', 'carry', 'notice', 'episode'))`,
    )
    .execute(db)
}
