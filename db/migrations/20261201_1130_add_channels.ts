import { type Kysely, sql } from 'kysely'

/** Push beside mail, what each person wants to hear and when, and a log of every try. */
const statements = [
  `alter table delivery drop constraint delivery_channel_check`,
  `alter table delivery add constraint delivery_channel_check check (channel in ('mail', 'push'))`,
  // Let go: what it was about was over, or in somebody's hand, before it could be sent. Nothing went wrong.
  `alter table delivery drop constraint delivery_state_check`,
  `alter table delivery add constraint delivery_state_check
    check (state in ('held', 'waiting', 'sent', 'given-up', 'let-go'))`,
  // Notices that go out together are one message.
  `alter table delivery drop constraint delivery_message_id_key`,
  // What is counted before a mail goes out: how many a person got within the hour.
  `create index delivery_sent_idx on delivery (user_id, sent_at) where sent_at is not null`,
  `create table delivery_try (
    site_id integer not null,
    id bigint generated always as identity,
    notice_id integer not null,
    user_id text not null,
    channel text not null,
    at timestamptz not null,
    outcome text not null check (outcome in ('sent', 'failed', 'given-up')),
    detail text not null default '',
    primary key (site_id, id),
    foreign key (site_id, notice_id, user_id, channel)
      references delivery (site_id, notice_id, user_id, channel) on delete cascade
  )`,
  `create index delivery_try_notice_idx on delivery_try (site_id, notice_id)`,
  `create table push_subscription (
    id bigint generated always as identity primary key,
    user_id text not null references "user" (id) on delete cascade,
    endpoint text not null unique,
    p256dh text not null,
    auth text not null,
    device text not null default '',
    created_at timestamptz not null default now(),
    last_sent_at timestamptz,
    -- Set when the push service said that the subscription is gone.
    gone_at timestamptz
  )`,
  `create index push_subscription_user_idx on push_subscription (user_id)`,
  // Null quiet hours and zone: the site's.
  `alter table member_setting
    add column push_on boolean not null default true,
    add column quiet_from time,
    add column quiet_to time,
    add column time_zone text,
    add column digest text not null default 'none' check (digest in ('none', 'daily', 'weekly')),
    add column digest_at time not null default '07:30',
    add column digest_weekday smallint not null default 1 check (digest_weekday between 1 and 7),
    -- While away, what would have been told goes to the person named instead.
    add column away_from timestamptz,
    add column away_until timestamptz,
    add column away_cover text references "user" (id) on delete set null,
    -- At work in the shop until then: no sound, only what can be seen at a glance.
    add column session_until timestamptz`,
  // What one person wants of one rule, where it differs from the rule's own.
  `create table member_rule (
    site_id integer not null references site (id) on delete cascade,
    user_id text not null references "user" (id) on delete cascade,
    rule text not null,
    mail_on boolean not null,
    push_on boolean not null,
    primary key (site_id, user_id, rule)
  )`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  const columns = [
    'session_until',
    'away_cover',
    'away_until',
    'away_from',
    'digest_weekday',
    'digest_at',
    'digest',
    'time_zone',
    'quiet_to',
    'quiet_from',
    'push_on',
  ]
  for (const column of columns) await sql.raw(`alter table member_setting drop column ${column}`).execute(db)
  for (const table of ['member_rule', 'push_subscription', 'delivery_try'])
    await sql.raw(`drop table ${table}`).execute(db)
  await sql.raw(`delete from delivery where channel = 'push'`).execute(db)
  await sql.raw(`update delivery set state = 'given-up' where state = 'let-go'`).execute(db)
  await sql.raw(`drop index delivery_sent_idx`).execute(db)
  await sql
    .raw(`update delivery set message_id = message_id || '.' || site_id || '.' || notice_id where tries > 0`)
    .execute(db)
  await sql.raw(`alter table delivery add constraint delivery_message_id_key unique (message_id)`).execute(db)
  await sql.raw(`alter table delivery drop constraint delivery_state_check`).execute(db)
  await sql
    .raw(
      `alter table delivery add constraint delivery_state_check
        check (state in ('held', 'waiting', 'sent', 'given-up'))`,
    )
    .execute(db)
  await sql.raw(`alter table delivery drop constraint delivery_channel_check`).execute(db)
  await sql
    .raw(`alter table delivery add constraint delivery_channel_check check (channel in ('mail'))`)
    .execute(db)
}
