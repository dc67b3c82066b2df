import { randomBytes } from 'node:crypto'
import { type Kysely, sql } from 'kysely'
import { insertRepeat } from '@/db/queries/carry-repeats'
import { newCode, takeIds } from '@/db/queries/counters'
import { insertOutcome } from '@/db/queries/outcomes'
import { insertPieceEvent } from '@/db/queries/piece-events'
import { doorTokenHash, insertDoor } from '@/db/queries/door-links'
import { insertRoom } from '@/db/queries/rooms'
import { insertSiteWood } from '@/db/queries/site-woods'
import { insertWeighing } from '@/db/queries/weighings'
import { insertSite, newTextId } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import type { Role } from '@/lib/sites/permissions'
import { ownWoodId } from '@/lib/wood/site-wood'

/** The ids, as seen from outside, of one of each thing of a site. */
export interface Things {
  site: string
  room: string
  /** A second room, a shop. */
  shop: string
  sensor: string
  piece: string
  /** A weighing of that piece. */
  weighing: string
  carry: string
  /** A plan that comes again, for whatever is taken. */
  repeat: string
  /** A screen by a door, and the secret of its link. */
  door: string
  doorToken: string
  /** A wood of the site's own. */
  wood: string
  notice: string
  /** A link of a mail that nobody signed. */
  link: string
  /** A note about the piece, by the hand. */
  event: string
  /** How the piece's lid turned, at rest. */
  outcome: string
  /** The membership of a maker. */
  member: string
  invitation: string
}

export interface WorldSite {
  siteId: number
  siteName: string
  organizationId: string
  things: Things
}

export type Team = Record<Role, string>

/** A site with one of each thing and a member of each role; cheap enough to have one for each request that changes it. */
export async function makeSite(db: Kysely<Database>, team: Team): Promise<WorldSite> {
  return db.transaction().execute(async (trx) => {
    const now = new Date()
    const siteName = `Yard ${randomBytes(3).toString('hex')}`
    const made = await insertSite(
      trx,
      { name: siteName, timeZone: 'Europe/London', unitSystem: 'metric' },
      team.owner,
      now,
    )
    const siteId = made.id
    const { organization_id: organizationId } = await trx
      .selectFrom('site')
      .where('id', '=', siteId)
      .select('organization_id')
      .executeTakeFirstOrThrow()
    const others = (['maker', 'hand', 'onlooker'] as const).map((role) => ({
      id: newTextId(),
      organizationId,
      userId: team[role],
      role,
      createdAt: now,
    }))
    await trx.insertInto('member').values(others).execute()
    const room = await insertRoom(
      trx,
      siteId,
      { name: 'Cupboard', kind: 'cupboard', isShared: true, note: '' },
      now,
    )
    const shop = await insertRoom(trx, siteId, { name: 'Shop', kind: 'shop', isShared: false, note: '' }, now)
    const sensor = await makeSensor(trx, siteId, room.id)
    const piece = await makePiece(trx, siteId, room.id)
    const weighing = await makeWeighing(trx, siteId, piece.id)
    const carry = await makeCarry(trx, siteId, { from: room.id, to: shop.id, piece: piece.id })
    const repeat = await insertRepeat(
      trx,
      siteId,
      {
        ...{ toRoomId: shop.id, cover: 'open', weekdays: [2], atTime: '09:00', stayMinutes: 60 },
        ...{ takesWhatever: true, note: '', userId: team.owner, pieceIds: [] },
      },
      now,
    )
    const doorToken = randomBytes(32).toString('base64url')
    const door = await insertDoor(
      trx,
      siteId,
      { name: 'By the door', roomId: shop.id, tokenHash: doorTokenHash(doorToken), userId: team.maker },
      now,
    )
    const wood = await makeWood(trx, siteId)
    const notice = await makeNotice(trx, siteId)
    const event = await makeEvent(trx, siteId, piece.id, team.hand)
    const outcome = await makeOutcome(trx, siteId, piece.id)
    const invitation = newTextId()
    await trx
      .insertInto('invitation')
      .values({
        id: invitation,
        organizationId,
        email: `invited.${invitation.slice(0, 8).toLowerCase()}@example.org`,
        role: 'hand',
        status: 'pending',
        createdAt: now,
        expiresAt: new Date(now.getTime() + 86_400_000),
        inviterId: team.owner,
      })
      .execute()
    return {
      siteId,
      siteName,
      organizationId,
      things: {
        site: made.site.id,
        room: room.code,
        shop: shop.code,
        sensor,
        piece: piece.code,
        weighing,
        carry,
        repeat,
        door,
        doorToken,
        wood,
        notice,
        link: 'made-up.link',
        event,
        outcome,
        member: others[0]?.id ?? '',
        invitation,
      },
    }
  })
}

async function makeSensor(db: Kysely<Database>, siteId: number, roomId: number): Promise<string> {
  const id = await takeIds(db, siteId, 'sensor')
  const code = newCode()
  await db
    .insertInto('sensor')
    .values({
      site_id: siteId,
      id,
      code,
      name: 'Shelf',
      secret_hash: '$7$101$c2FsdA==$aGFzaA==',
      secret_set_at: new Date(),
    })
    .execute()
  const hungAt = new Date(Date.now() - 3_600_000)
  await db
    .insertInto('placement')
    .values({ site_id: siteId, sensor_id: id, from_at: hungAt, room_id: roomId })
    .execute()
  await db.insertInto('sensor_state').values({ site_id: siteId, sensor_id: id }).execute()
  return code
}

async function makeWeighing(db: Kysely<Database>, siteId: number, pieceId: number): Promise<string> {
  const at = new Date(Date.now() - 7_200_000)
  const values = { pieceId, at, grams: 182.5, stepG: null, note: '', userId: null }
  return insertWeighing(db, siteId, values, at)
}

async function makePiece(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(db, siteId, 'piece')
  const code = newCode()
  await db
    .insertInto('piece')
    .values({
      site_id: siteId,
      id,
      code,
      number: 'W1',
      stage: 'box',
      wood: 'fraxinus-excelsior',
      joint_diameter_mm: 60,
      fit_grade: 'snug',
      is_shared: true,
      keep_room_id: roomId,
    })
    .execute()
  await db
    .insertInto('piece_place')
    .values({
      site_id: siteId,
      piece_id: id,
      from_at: new Date(Date.now() - 7_200_000),
      room_id: roomId,
    })
    .execute()
  return { id, code }
}

async function makeCarry(
  db: Kysely<Database>,
  siteId: number,
  way: { from: number; to: number; piece: number },
): Promise<string> {
  const id = await takeIds(db, siteId, 'carry')
  const code = newCode()
  await db
    .insertInto('carry')
    .values({
      site_id: siteId,
      id,
      code,
      state: 'planned',
      to_room_id: way.to,
      cover: 'open',
      planned_at: new Date(Date.now() + 3_600_000),
      stay_minutes: 60,
    })
    .execute()
  await db
    .insertInto('carry_piece')
    .values({
      site_id: siteId,
      carry_id: id,
      piece_id: way.piece,
      from_room_id: way.from,
      cover: 'open',
    })
    .execute()
  return code
}

async function makeWood(db: Kysely<Database>, siteId: number): Promise<string> {
  const wood = await insertSiteWood(
    db,
    siteId,
    {
      ...{ overrides: null, commonName: 'Hedge ash', latinName: 'Fraxinus excelsior' },
      ...{ movementClass: 'medium', radialPerPct: 0.0018, tangentialPerPct: 0.003, densityKgM3: null },
      ...{ source: '', note: '' },
    },
    new Date(),
  )
  return ownWoodId(wood.code)
}

async function makeNotice(db: Kysely<Database>, siteId: number): Promise<string> {
  const id = await takeIds(db, siteId, 'notice')
  const code = newCode()
  await db
    .insertInto('notice')
    .values({
      site_id: siteId,
      id,
      code,
      key: code,
      rule: 'sensor-silent',
      urgency: 'whenever',
      mark: 'silent',
      title: 'Shelf is silent',
      at: new Date(),
    })
    .execute()
  return code
}

/** The hand's own, so that every role that may enter one may take it back. */
async function makeEvent(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  userId: string,
): Promise<string> {
  const note = {
    pieceId,
    kind: 'note',
    at: new Date(),
    roomId: null,
    data: {},
    note: 'a note',
    userId,
  } as const
  return (await insertPieceEvent(db, siteId, note, new Date())).code
}

const makeOutcome = (db: Kysely<Database>, siteId: number, pieceId: number): Promise<string> =>
  insertOutcome(
    db,
    siteId,
    {
      ...{ pieceId, carryId: null, turned: 'as-before', movementClass: 'medium', note: '', userId: null },
      used: { slow: null, middle: null, fast: null },
    },
    new Date(),
  )

// What requests may change of a site. That somebody was here is noted by reading, so it does not count.
const tables = [
  ...['room', 'sensor', 'placement', 'piece', 'piece_place', 'carry', 'carry_piece', 'notice', 'notice_seen'],
  ...[
    'episode',
    'delivery',
    'notice_answer',
    'change',
    'site_wood',
    'reading',
    'room_hour',
    'room_day',
    'refused',
  ],
  ...['piece_event', 'outcome', 'carry_repeat', 'carry_repeat_piece', 'lock_up'],
]

/** Everything of a site in one text: equal before and after means that nothing was changed. */
export async function fingerprintOf(
  db: Kysely<Database>,
  { siteId, organizationId }: Pick<WorldSite, 'siteId' | 'organizationId'>,
): Promise<string> {
  const part = (table: string, where: ReturnType<typeof sql>) =>
    sql`select ${table}::text as part, coalesce(string_agg(t::text, ' ' order by t::text), '') as rows
        from ${sql.table(table)} t where ${where}`
  const parts = [
    part('site', sql`id = ${siteId}`),
    part('member', sql`"organizationId" = ${organizationId}`),
    part('invitation', sql`"organizationId" = ${organizationId}`),
    ...tables.map((table) => part(table, sql`site_id = ${siteId}`)),
    sql`select 'wishes' as part, coalesce(string_agg(concat_ws(',', user_id, unit_system, mail_on, on_house_list), ' '), '')
        as rows from member_setting where site_id = ${siteId}
        and (unit_system is not null or not mail_on or on_house_list)`,
  ]
  const { rows } = await sql<{ part: string; rows: string }>`${sql.join(parts, sql` union all `)}`.execute(db)
  return rows.map((row) => `${row.part}: ${row.rows}`).join('\n')
}
