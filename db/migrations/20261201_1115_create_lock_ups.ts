import { type Kysely, sql } from 'kysely'

/** What was answered at lock-up, when a plan was put off, and which questions about a lid were passed over. */
const statements = [
  `create table lock_up (
    site_id integer not null references site (id) on delete cascade,
    -- In the site's zone.
    day_on date not null,
    nothing_else_at timestamptz,
    nothing_else_by text references "user" (id) on delete set null,
    closed_at timestamptz,
    closed_by text references "user" (id) on delete set null,
    primary key (site_id, day_on)
  )`,
  `alter table carry add column put_off_at timestamptz`,
  `alter table carry_repeat add column paused_at timestamptz`,
  `alter table carry_piece add column ask_skipped_at timestamptz`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql.raw('alter table carry_piece drop column ask_skipped_at').execute(db)
  await sql.raw('alter table carry_repeat drop column paused_at').execute(db)
  await sql.raw('alter table carry drop column put_off_at').execute(db)
  await sql.raw('drop table lock_up').execute(db)
}
