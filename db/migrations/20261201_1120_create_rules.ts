import { type Kysely, sql } from 'kysely'

/** What a site has changed of its rules, and what its people have answered to notices. */
const statements = [
  // A rule without a row is as it comes.
  `create table rule (
    site_id integer not null references site (id) on delete cascade,
    rule text not null,
    is_on boolean not null,
    settings jsonb not null default '{}',
    version integer not null default 1,
    changed_at timestamptz not null default now(),
    changed_by text references "user" (id) on delete set null,
    primary key (site_id, rule)
  )`,
  // Answers to what is asked in the evening and of what is out. Each person's each answer stands; the newest counts.
  `create table notice_answer (
    site_id integer not null,
    id bigint generated always as identity,
    notice_id integer not null,
    user_id text not null references "user" (id) on delete cascade,
    answer text not null check (answer in ('in', 'going', 'cant', 'later', 'nothing')),
    at timestamptz not null,
    -- For "later": when to ask again.
    until timestamptz,
    via text not null check (via in ('page', 'mail', 'push')),
    primary key (site_id, id),
    foreign key (site_id, notice_id) references notice (site_id, id) on delete cascade
  )`,
  `create index notice_answer_notice_idx on notice_answer (site_id, notice_id, at)`,
  // Links in mails work once; what has been used is remembered until it would have expired anyway.
  `create table used_link (
    link_id text primary key,
    expires_at timestamptz not null
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of ['used_link', 'notice_answer', 'rule']) await sql.raw(`drop table ${table}`).execute(db)
}
