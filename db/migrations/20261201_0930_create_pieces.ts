import { type Kysely, sql } from 'kysely'

/** Pieces, where each has been, and carries. */
const statements = [
  `create table piece (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    number text not null check (length(number) between 1 and 12),
    stage text not null check (stage in ('blank', 'roughed', 'box')),
    wood text,
    wood_kind text not null default 'plain' check (wood_kind in ('plain', 'stabilised', 'hybrid', 'wild')),
    grain text not null default 'end-grain' check (grain in ('end-grain', 'side-grain')),
    spigot_on text not null default 'base' check (spigot_on in ('base', 'lid')),
    lid_form text not null default 'plug' check (lid_form in ('plug', 'hollow')),
    joint_diameter_mm real check (joint_diameter_mm > 0 and joint_diameter_mm <= 600),
    wall_mm real check (wall_mm > 0 and wall_mm <= 60),
    spigot_mm real check (spigot_mm > 0 and spigot_mm <= 60),
    lid_mm real check (lid_mm > 0 and lid_mm <= 100),
    body_wall_mm real check (body_wall_mm > 0 and body_wall_mm <= 100),
    fit_grade text check (fit_grade in ('suction', 'snap', 'snug', 'easy', 'loose', 'threaded')),
    clearance_mm real check (clearance_mm >= 0 and clearance_mm <= 5),
    allowance_mm real check (allowance_mm > 0 and allowance_mm <= 5),
    finish text not null default '' check (length(finish) <= 200),
    keep_room_id integer,
    fitted_room_id integer,
    fitted_on date,
    fitted_at timestamptz,
    fit_mc_pct real check (fit_mc_pct >= 0 and fit_mc_pct <= 30),
    note text not null default '' check (length(note) <= 4000),
    owner_user_id text references "user" (id) on delete set null,
    is_private boolean not null default false,
    is_shared boolean not null default false,
    version integer not null default 1,
    created_at timestamptz not null default now(),
    archived_at timestamptz,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, keep_room_id) references room (site_id, id),
    foreign key (site_id, fitted_room_id) references room (site_id, id)
  )`,
  `create unique index piece_number_idx on piece (site_id, lower(number)) where archived_at is null`,
  `create table carry (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    state text not null check (state in ('planned', 'out', 'back', 'called-off')),
    to_room_id integer not null,
    cover text not null check (cover in ('open', 'lid-on', 'bagged', 'tub')),
    planned_at timestamptz not null,
    stay_minutes integer not null check (stay_minutes between 1 and 43200),
    started_at timestamptz,
    ended_at timestamptz,
    against_advice boolean not null default false,
    note text not null default '' check (length(note) <= 500),
    created_by text references "user" (id) on delete set null,
    created_at timestamptz not null default now(),
    version integer not null default 1,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, to_room_id) references room (site_id, id),
    check ((state = 'planned') = (started_at is null) or state = 'called-off')
  )`,
  `create index carry_state_idx on carry (site_id, state, planned_at)`,
  `create table carry_piece (
    site_id integer not null,
    carry_id integer not null,
    piece_id integer not null,
    from_room_id integer,
    cover text not null check (cover in ('open', 'lid-on', 'bagged', 'tub')),
    out_at timestamptz,
    back_at timestamptz,
    back_room_id integer,
    primary key (site_id, carry_id, piece_id),
    foreign key (site_id, carry_id) references carry (site_id, id) on delete cascade,
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade,
    foreign key (site_id, from_room_id) references room (site_id, id),
    foreign key (site_id, back_room_id) references room (site_id, id)
  )`,
  // A piece is out once at a time, whatever two people press at once.
  `create unique index carry_piece_out_idx on carry_piece (site_id, piece_id) where out_at is not null and back_at is null`,
  // The place history that the wood model reads. The current place has no end.
  `create table piece_place (
    site_id integer not null,
    piece_id integer not null,
    from_at timestamptz not null,
    to_at timestamptz check (to_at > from_at),
    room_id integer not null,
    cover text not null default 'closed' check (cover in ('open', 'lid-on', 'bagged', 'tub', 'closed')),
    carry_id integer,
    moved_by text references "user" (id) on delete set null,
    primary key (site_id, piece_id, from_at),
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade,
    foreign key (site_id, room_id) references room (site_id, id),
    foreign key (site_id, carry_id) references carry (site_id, id)
  )`,
  `create unique index piece_place_current_idx on piece_place (site_id, piece_id) where to_at is null`,
  `create index piece_place_room_idx on piece_place (site_id, room_id) where to_at is null`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['piece_place', 'carry_piece', 'carry', 'piece'])
    await sql.raw(`drop table ${table}`).execute(db)
}
