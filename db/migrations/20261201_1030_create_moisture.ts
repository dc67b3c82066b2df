import { type Kysely, sql } from 'kysely'

/** The wood of each piece as followed so far, and how lids turned after carries. */
const statements = [
  `create table piece_moisture (
    site_id integer not null,
    piece_id integer not null,
    -- Up to here the air has been followed; always a whole hour.
    at timestamptz not null,
    state jsonb not null,
    -- For a piece that is out: when it went, and its wood at that moment.
    out_at timestamptz,
    out_state jsonb,
    -- What the state was made from: the piece's own facts and places, and the figures of the rooms it was in.
    piece_key text not null,
    air_key text not null,
    made_at timestamptz not null default now(),
    primary key (site_id, piece_id),
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade
  )`,
  `create table outcome (
    site_id integer not null,
    id integer not null,
    code text not null,
    piece_id integer not null,
    carry_id integer,
    at timestamptz not null,
    turned text not null check (turned in ('as-before', 'tighter', 'binds', 'looser')),
    movement_class text not null check (movement_class in ('small', 'medium', 'large')),
    -- Allowance used by then as the model had it, for slow, middling and fast wood; null where it had no answer.
    used_slow real,
    used_middle real,
    used_fast real,
    note text not null default '' check (length(note) <= 1000),
    user_id text references "user" (id) on delete set null,
    created_at timestamptz not null default now(),
    undone_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade,
    foreign key (site_id, carry_id) references carry (site_id, id)
  )`,
  `create index outcome_class_idx on outcome (site_id, movement_class, at desc)`,
  `create index outcome_piece_idx on outcome (site_id, piece_id, at)`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['outcome', 'piece_moisture']) await sql.raw(`drop table ${table}`).execute(db)
}
