import { type Kysely, sql } from 'kysely'

/** Plans that come again, plans for "whatever I take", and plans that were put off. */
const statements = [
  `alter table site_counter drop constraint site_counter_kind_check`,
  `alter table site_counter add constraint site_counter_kind_check
    check (kind in ('room', 'sensor', 'piece', 'carry', 'notice', 'episode', 'wood', 'event', 'weighing', 'outcome',
      'repeat', 'door'))`,
  `create table carry_repeat (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    to_room_id integer not null,
    cover text not null check (cover in ('open', 'lid-on', 'bagged', 'tub')),
    -- ISO: 1 is Monday.
    weekdays smallint[] not null check (cardinality(weekdays) between 1 and 7),
    at_time time not null,
    stay_minutes integer not null check (stay_minutes between 1 and 43200),
    takes_whatever boolean not null default false,
    note text not null default '' check (length(note) <= 500),
    created_by text references "user" (id) on delete set null,
    created_at timestamptz not null default now(),
    ended_at timestamptz,
    version integer not null default 1,
    primary key (site_id, id),
    unique (site_id, code),
    foreign key (site_id, to_room_id) references room (site_id, id)
  )`,
  `create table carry_repeat_piece (
    site_id integer not null,
    repeat_id integer not null,
    piece_id integer not null,
    primary key (site_id, repeat_id, piece_id),
    foreign key (site_id, repeat_id) references carry_repeat (site_id, id) on delete cascade,
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade
  )`,
  `alter table carry add column takes_whatever boolean not null default false`,
  `alter table carry add column repeat_id integer`,
  // The day of the repeat that it stands for, in the site's zone: made once, even when it is called off or put off.
  `alter table carry add column repeat_on date`,
  `alter table carry add column put_off_from timestamptz`,
  `alter table carry add foreign key (site_id, repeat_id) references carry_repeat (site_id, id) on delete cascade`,
  `create unique index carry_repeat_day_idx on carry (site_id, repeat_id, repeat_on)`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const column of ['put_off_from', 'repeat_on', 'repeat_id', 'takes_whatever'])
    await sql.raw(`alter table carry drop column ${column}`).execute(db)
  for (const table of ['carry_repeat_piece', 'carry_repeat']) await sql.raw(`drop table ${table}`).execute(db)
  await sql.raw(`delete from site_counter where kind in ('repeat', 'door')`).execute(db)
  await sql.raw(`alter table site_counter drop constraint site_counter_kind_check`).execute(db)
  await sql
    .raw(
      `alter table site_counter add constraint site_counter_kind_check
        check (kind in ('room', 'sensor', 'piece', 'carry', 'notice', 'episode', 'wood', 'event', 'weighing', 'outcome'))`,
    )
    .execute(db)
}
