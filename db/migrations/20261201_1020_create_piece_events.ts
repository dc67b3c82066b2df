import { type Kysely, sql } from 'kysely'

/**
 * What happened to a piece, and what it weighed. Nothing is erased: an event or a weighing that was entered by mistake
 * is marked as undone.
 */
const statements = [
  `create table piece_event (
    site_id integer not null,
    id integer not null,
    code text not null,
    piece_id integer not null,
    kind text not null check (kind in
      ('final-fit', 're-true', 'roughed', 'near-final', 'cut', 'oil', 'wax', 'label', 'meter', 'oven-dry', 'note')),
    at timestamptz not null,
    room_id integer,
    -- final-fit and re-true: ringMcPct, lidMcPct, doubtPct, fitGrade, clearanceMm; meter: mcPct; oven-dry: ovenDryG.
    data jsonb not null default '{}',
    note text not null default '' check (length(note) <= 1000),
    user_id text references "user" (id) on delete set null,
    created_at timestamptz not null default now(),
    undone_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade,
    foreign key (site_id, room_id) references room (site_id, id)
  )`,
  `create index piece_event_piece_idx on piece_event (site_id, piece_id, at)`,
  `create table weighing (
    site_id integer not null,
    id integer not null,
    code text not null,
    piece_id integer not null,
    at timestamptz not null,
    grams real not null check (grams > 0 and grams <= 200000),
    step_g real check (step_g > 0 and step_g <= 100),
    note text not null default '' check (length(note) <= 1000),
    user_id text references "user" (id) on delete set null,
    created_at timestamptz not null default now(),
    undone_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade
  )`,
  `create index weighing_piece_idx on weighing (site_id, piece_id, at)`,
  `create unique index weighing_moment_idx on weighing (site_id, piece_id, at) where undone_at is null`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['weighing', 'piece_event']) await sql.raw(`drop table ${table}`).execute(db)
}
