import { type Kysely, sql } from 'kysely'

/** Episodes of a rule, the notices they lead to, who has seen them, the outbox, retried requests, and the demo's mail. */
const statements = [
  // One episode per rule and subject at a time; "key" names the occasion, so that two workers cannot tell one twice.
  `create table episode (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    rule text not null,
    subject text not null,
    key text not null,
    state text not null check (state in ('pending', 'telling', 'acknowledged', 'over')),
    began_at timestamptz not null,
    told_at timestamptz,
    ended_at timestamptz,
    data jsonb not null default '{}',
    primary key (site_id, id),
    unique (site_id, rule, subject, key)
  )`,
  `create unique index episode_open_idx on episode (site_id, rule, subject) where state <> 'over'`,
  `create table notice (
    site_id integer not null references site (id) on delete cascade,
    id integer not null,
    code text not null,
    episode_id integer,
    key text not null,
    rule text not null,
    urgency text not null check (urgency in ('now', 'soon', 'whenever')),
    mark text not null check (mark in ('fine', 'keep-short', 'leave', 'silent', 'weigh', 'unknown')),
    title text not null,
    body text not null default '',
    link text not null default '',
    carry_id integer,
    piece_id integer,
    sensor_id integer,
    room_id integer,
    at timestamptz not null,
    acknowledged_at timestamptz,
    acknowledged_by text references "user" (id) on delete set null,
    primary key (site_id, id),
    unique (site_id, code),
    unique (site_id, key),
    foreign key (site_id, episode_id) references episode (site_id, id) on delete cascade,
    foreign key (site_id, carry_id) references carry (site_id, id) on delete cascade,
    foreign key (site_id, piece_id) references piece (site_id, id) on delete cascade,
    foreign key (site_id, sensor_id) references sensor (site_id, id) on delete cascade,
    foreign key (site_id, room_id) references room (site_id, id) on delete cascade
  )`,
  `create index notice_at_idx on notice (site_id, at desc, id desc)`,
  `create table notice_seen (
    site_id integer not null,
    notice_id integer not null,
    user_id text not null references "user" (id) on delete cascade,
    seen_at timestamptz not null,
    primary key (site_id, notice_id, user_id),
    foreign key (site_id, notice_id) references notice (site_id, id) on delete cascade
  )`,
  `create table delivery (
    site_id integer not null,
    notice_id integer not null,
    user_id text not null references "user" (id) on delete cascade,
    channel text not null check (channel in ('mail')),
    message_id text not null unique,
    state text not null check (state in ('held', 'waiting', 'sent', 'given-up')),
    hold_until timestamptz,
    tries integer not null default 0,
    sent_at timestamptz,
    last_error text,
    primary key (site_id, notice_id, user_id, channel),
    foreign key (site_id, notice_id) references notice (site_id, id) on delete cascade
  )`,
  `create index delivery_waiting_idx on delivery (state, hold_until) where state in ('held', 'waiting')`,
  // The answer to a request that makes something is kept for a day, so that a retry gets the same answer.
  `create table idempotency (
    user_id text not null,
    key text not null,
    request_hash text not null,
    status integer,
    body jsonb,
    headers jsonb,
    created_at timestamptz not null default now(),
    primary key (user_id, key)
  )`,
  `create index idempotency_created_idx on idempotency (created_at)`,
  `create table rate_count (
    key text not null,
    window_at timestamptz not null,
    n integer not null,
    primary key (key, window_at)
  )`,
  `create table demo_mail (
    id bigint generated always as identity primary key,
    at timestamptz not null default now(),
    message_id text not null default '',
    sender text not null,
    recipients text[] not null,
    subject text not null,
    text_body text not null,
    html_body text not null
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  const tables = ['demo_mail', 'rate_count', 'idempotency', 'delivery', 'notice_seen', 'notice', 'episode']
  for (const table of tables) await sql.raw(`drop table ${table}`).execute(db)
}
