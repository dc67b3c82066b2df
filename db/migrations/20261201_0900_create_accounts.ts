import { type Kysely, sql } from 'kysely'

/**
 * The tables that better-auth 1.7 and its organisation plugin expect, with that library's own column names.
 * They are frozen here so that the whole database has one history.
 */
const statements = [
  `create table "user" (
    "id" text not null primary key,
    "name" text not null,
    "email" text not null unique,
    "emailVerified" boolean not null,
    "image" text,
    "createdAt" timestamptz not null default current_timestamp,
    "updatedAt" timestamptz not null default current_timestamp
  )`,
  `create table "session" (
    "id" text not null primary key,
    "expiresAt" timestamptz not null,
    "token" text not null unique,
    "createdAt" timestamptz not null default current_timestamp,
    "updatedAt" timestamptz not null,
    "ipAddress" text,
    "userAgent" text,
    "userId" text not null references "user" ("id") on delete cascade,
    "activeOrganizationId" text
  )`,
  `create table "account" (
    "id" text not null primary key,
    "accountId" text not null,
    "providerId" text not null,
    "userId" text not null references "user" ("id") on delete cascade,
    "accessToken" text,
    "refreshToken" text,
    "idToken" text,
    "accessTokenExpiresAt" timestamptz,
    "refreshTokenExpiresAt" timestamptz,
    "scope" text,
    "password" text,
    "createdAt" timestamptz not null default current_timestamp,
    "updatedAt" timestamptz not null
  )`,
  `create table "verification" (
    "id" text not null primary key,
    "identifier" text not null,
    "value" text not null,
    "expiresAt" timestamptz not null,
    "createdAt" timestamptz not null default current_timestamp,
    "updatedAt" timestamptz not null default current_timestamp
  )`,
  `create table "organization" (
    "id" text not null primary key,
    "name" text not null,
    "slug" text not null unique,
    "logo" text,
    "createdAt" timestamptz not null,
    "metadata" text
  )`,
  `create table "member" (
    "id" text not null primary key,
    "organizationId" text not null references "organization" ("id") on delete cascade,
    "userId" text not null references "user" ("id") on delete cascade,
    "role" text not null check ("role" in ('owner', 'maker', 'hand', 'onlooker')),
    "createdAt" timestamptz not null,
    unique ("organizationId", "userId")
  )`,
  `create table "invitation" (
    "id" text not null primary key,
    "organizationId" text not null references "organization" ("id") on delete cascade,
    "email" text not null,
    "role" text,
    "status" text not null,
    "expiresAt" timestamptz not null,
    "createdAt" timestamptz not null default current_timestamp,
    "inviterId" text not null references "user" ("id") on delete cascade
  )`,
  `create table "rateLimit" (
    "id" text not null primary key,
    "key" text not null unique,
    "count" integer not null,
    "lastRequest" bigint not null
  )`,
  `create index "session_userId_idx" on "session" ("userId")`,
  `create index "account_userId_idx" on "account" ("userId")`,
  `create index "verification_identifier_idx" on "verification" ("identifier")`,
  `create index "member_userId_idx" on "member" ("userId")`,
  `create index "invitation_organizationId_idx" on "invitation" ("organizationId")`,
  `create index "invitation_email_idx" on "invitation" ("email")`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of [
    'rateLimit',
    'invitation',
    'member',
    'organization',
    'verification',
    'account',
    'session',
    'user',
  ])
    await sql.raw(`drop table "${table}"`).execute(db)
}
