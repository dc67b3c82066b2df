import { mkdtemp, readFile, rm, stat } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { verifyPassword } from 'better-auth/crypto'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { getWeighings, weighingsQuerySchema } from '@/app/_server/weighings'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { listOpenCarries, type CarryRecord } from '@/db/queries/carries'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { deleteSite } from '@/db/queries/sites'
import { isSensorSecret } from '@/db/sensor-secret'
import type { VerdictCheck } from '@/lib/carry/carry-check'
import { judgePiece } from '@/lib/carry/judge'
import type { CarryMaterial } from '@/lib/carry/material'
import { silentAfterMs } from '@/lib/notices/policy'
import { demoRosterSchema, type DemoRoster } from '@/lib/sensors/demo-roster'
import type { RestView } from '@/lib/seasoning/rest-view'
import { demoAccounts, demoPassword } from '@/lib/sites/demo'
import { lookAfterDemo } from '@/workers/demo/look-after'
import { makeDemo } from '@/workers/demo/make-demo'
import type { MadePlace } from '@/workers/demo/make-place'
import { placeTimeZone } from '@/workers/demo/place'
import { createTestDatabase, type TestDatabase } from '../support/database'

const minuteMs = 60_000
const hourMs = 60 * minuteMs
/** Less past, and fewer readings of it, than the real demo has: what is tested needs two months. */
const short = { days: 54, everyS: 1200 }
const long = { days: 125, everyS: 1200 }
const seasons = ['2026-01-18', '2026-04-27', '2026-07-29', '2026-10-14']
const hours = ['03:20', '09:05', '15:40']

describe.each(seasons.flatMap((day) => hours.map((hour) => `${day}T${hour}:00Z`)))(
  'a demo made at %s',
  (at) => {
    const now = new Date(at)
    let database: TestDatabase
    let place: MadePlace
    let roster: DemoRoster | undefined
    const said: string[] = []
    let carries: CarryRecord[]
    let material: CarryMaterial
    let ids: Map<string, number>

    beforeAll(async () => {
      database = await createTestDatabase()
      place = await makeDemo(database.db, {
        now,
        ...short,
        say: (sentence) => said.push(sentence),
        keepRoster: async (one) => void (roster = one),
      })
      const pieces = await database.db.selectFrom('piece').select(['id', 'number']).execute()
      ids = new Map(pieces.map((piece) => [piece.number, piece.id]))
      carries = await listOpenCarries(database.db, place.siteId)
      const site = { siteId: place.siteId, timeZone: placeTimeZone }
      material = await loadCarryMaterial(database.db, site, [...ids.values()], [place.rooms.shop], now)
    })
    afterAll(() => database.drop())

    /** As the page and the notices judge a piece of an open carry. */
    function judged(number: string): { carry: CarryRecord; check: VerdictCheck } {
      const pieceId = ids.get(number)
      const carry = carries.find((one) => one.pieces.some((piece) => piece.pieceId === pieceId))
      const part = carry?.pieces.find((piece) => piece.pieceId === pieceId)
      if (carry === undefined || part === undefined || pieceId === undefined)
        throw new Error(`${number} has no carry`)
      const judgedPiece = judgePiece(material, {
        pieceId,
        toRoomId: carry.toRoom.roomId,
        startsAt: part.outAt ?? carry.plannedAt,
        stayMinutes: carry.stayMinutes,
        cover: part.cover,
      })
      if (judgedPiece?.check.kind !== 'verdict') throw new Error(`${number}: ${JSON.stringify(judgedPiece)}`)
      return { carry, check: judgedPiece.check }
    }
    const earlyInMinutes = (number: string) =>
      (Date.parse(judged(number).check.earlyAt ?? '9999-01-01') - now.getTime()) / minuteMs

    test('has a carry planned within the hour that should not be made', () => {
      const { carry, check } = judged('219')
      expect(carry.state).toBe('planned')
      expect(carry.plannedAt.getTime()).toBeGreaterThan(now.getTime())
      expect(carry.plannedAt.getTime()).toBeLessThanOrEqual(now.getTime() + hourMs)
      expect(check.verdict).toBe('leave')
      expect(check.usedAtStart).toBeLessThan(1)
      expect(judged('214').check.verdict).toBe('keep-short')
      expect(judged('205').check.verdict).toBe('fine')
    })

    test('has a piece out that is due within the hour, and one with hours left', () => {
      expect(judged('207').carry.state).toBe('out')
      expect(earlyInMinutes('207')).toBeGreaterThan(5)
      expect(earlyInMinutes('207')).toBeLessThan(60)
      expect(earlyInMinutes('221')).toBeGreaterThan(120)
    })

    test('has a piece out that is overdue, and was well when it went', () => {
      expect(judged('203').carry.state).toBe('out')
      expect(earlyInMinutes('203')).toBeLessThan(-30)
      expect(judged('203').check.usedAtStart).toBeLessThan(1)
    })

    test('has a box that was fitted in the shop and is loose indoors', () => {
      const check = judgePiece(material, {
        pieceId: ids.get('198') ?? 0,
        toRoomId: place.rooms.shop,
        startsAt: now,
        stayMinutes: 60,
        cover: 'open',
      })?.check
      if (check?.kind !== 'verdict') throw new Error('198 can not be judged')
      expect(check.usedAtStart).toBeGreaterThan(1)
      expect(check.ringMcPct).toBeLessThan(check.cutMcPct - 2)
    })

    test('has one silent sensor, one that is late, and fresh air everywhere else', async () => {
      const states = await database.db
        .selectFrom('sensor')
        .innerJoin('sensor_state', (join) =>
          join
            .onRef('sensor_state.site_id', '=', 'sensor.site_id')
            .onRef('sensor_state.sensor_id', '=', 'sensor.id'),
        )
        .select(['sensor.name', 'sensor.id', 'sensor_state.at', 'sensor_state.usual_gap_s'])
        .execute()
      expect(states).toHaveLength(9)
      const ageMs = (name: string) =>
        now.getTime() - (states.find((state) => state.name === name)?.at?.getTime() ?? 0)
      const silent = states.filter((state) => ageMs(state.name) > silentAfterMs(state.usual_gap_s))
      expect(silent.map((state) => state.name)).toEqual(['Timber store'])
      expect(ageMs('Timber store')).toBeLessThan(24 * hourMs)
      expect(ageMs('Study')).toBeGreaterThan(75 * minuteMs)
      const late = await database.db.selectFrom('ingest_count').select(['kind', 'n']).execute()
      expect(late).toEqual([{ kind: 'late', n: expect.any(Number) }])
      for (const room of ['cupboard', 'study', 'kitchen', 'shop', 'tub'] as const)
        expect(material.rooms.get(place.rooms[room])?.air.kind).toBe('fresh')
      expect(material.rooms.get(place.rooms.store)?.air.kind).toBe('stale')
    })

    test('says nothing about joints that could not be found', () => {
      expect(said.filter((sentence) => sentence.includes('no joint'))).toEqual([])
    })

    test('lists its sensors with secrets that open the door', async () => {
      const parsed = demoRosterSchema.parse(roster)
      expect(parsed.siteCode).toBe(place.siteCode)
      expect(parsed.sensors.map((sensor) => sensor.habit).toSorted()).toEqual([
        'drops-out',
        'silent',
        ...Array<string>(7).fill('steady'),
      ])
      const stored = await database.db.selectFrom('sensor').select(['code', 'secret_hash']).execute()
      for (const { code, secret } of parsed.sensors) {
        const hash = stored.find((row) => row.code === code)?.secret_hash ?? ''
        expect(await isSensorSecret(secret, hash)).toBe(true)
      }
    })
  },
)

// The driest and the dampest of the year: what lies between is easier.
describe.each(['2026-01-18T09:05:00Z', '2026-07-29T09:05:00Z'])(
  'the resting pieces of a demo made at %s',
  (at) => {
    const now = new Date(at)
    let database: TestDatabase
    let maker: SiteMember
    const rests = new Map<string, RestView>()

    beforeAll(async () => {
      database = await createTestDatabase()
      const { db } = database
      // Long enough for the middle of a year to mean something, and for a series of weights.
      const place = await makeDemo(db, {
        now,
        ...long,
        say: () => undefined,
        keepRoster: async () => undefined,
      })
      const user = await db
        .selectFrom('user')
        .where('email', '=', 'maker@example.org')
        .select('id')
        .executeTakeFirstOrThrow()
      const member = await findSiteMember(db, place.siteCode, user.id)
      if (member === undefined) throw new Error('no maker')
      maker = member
      const pieces = await db
        .selectFrom('piece')
        .where('is_private', '=', false)
        .select(['code', 'number'])
        .execute()
      for (const { code, number } of pieces) {
        const page = await getWeighings(db, maker, code, weighingsQuerySchema.parse({}), now)
        if (page.ok && page.value.rest !== null) rests.set(number, page.value.rest)
      }
    })
    afterAll(() => database.drop())

    const restOf = (number: string): RestView => {
      const rest = rests.get(number)
      if (rest === undefined) throw new Error(`nothing of ${number}`)
      return rest
    }
    const missing = (number: string) => restOf(number).missing.map(({ code }) => code)

    test('hold a blank that is ready by the rule', () => {
      expect(missing('127')).toEqual([])
      expect(restOf('127').state).toBe('ready')
    })

    test('hold one that looks ready, for it keeps its weight, and is not', () => {
      expect(missing('94')).toEqual(['mc-off'])
      expect(restOf('94').met.join(' ')).toMatch(/weighed the same for eight weeks/)
    })

    test('hold one that is on its way, with a range of days', () => {
      expect(restOf('103').state).toBe('not-ready')
      expect(restOf('103').forecast?.direction).toBe('drying')
      expect(Date.parse(restOf('103').readyToAt ?? '')).toBeGreaterThan(now.getTime())
    })

    test('hold one whose series was closed by a cut, and one with too few weights', () => {
      expect(restOf('102').series).toMatchObject({ openedBy: { kind: 'cut' }, weights: 2, earlierWeights: 5 })
      expect(missing('110')).toContain('too-few-weights')
      expect(restOf('110').series).toEqual({ openedBy: null, weights: 2, earlierWeights: 0 })
    })
  },
)

describe('looking after the demo', () => {
  const now = new Date('2026-03-05T13:10:00Z')
  let database: TestDatabase
  let dataDir: string
  const said: string[] = []
  const lookAfter = (isReset = false) =>
    lookAfterDemo(database.db, {
      now,
      days: 2,
      everyS: 1200,
      dataDir,
      isReset,
      say: (sentence) => said.push(sentence),
    })
  const site = () =>
    database.db.selectFrom('site').where('is_demo', '=', true).selectAll().executeTakeFirstOrThrow()
  const rosterText = () => readFile(path.join(dataDir, 'demo-sensors.json'), 'utf8')

  beforeAll(async () => {
    database = await createTestDatabase()
    dataDir = await mkdtemp(path.join(os.tmpdir(), 'lidfast-demo-'))
    await lookAfter()
  })
  afterAll(async () => {
    await database.drop()
    await rm(dataDir, { recursive: true, force: true })
  })

  test('makes four verified accounts, one per role, that open with the password of the demo', async () => {
    const members = await database.db
      .selectFrom('member')
      .innerJoin('user', 'user.id', 'member.userId')
      .innerJoin('account', 'account.userId', 'user.id')
      .select(['user.email', 'member.role', 'user.emailVerified', 'account.password', 'account.providerId'])
      .execute()
    expect(members.map(({ email, role }) => ({ email, role })).toSorted(byEmail)).toEqual(
      [...demoAccounts].toSorted(byEmail),
    )
    for (const { emailVerified, password, providerId } of members) {
      expect({ emailVerified, providerId }).toEqual({ emailVerified: true, providerId: 'credential' })
      expect(await verifyPassword({ hash: password ?? '', password: demoPassword })).toBe(true)
    }
  })

  test('keeps the secrets where only their owner can read them', async () => {
    expect((await stat(path.join(dataDir, 'demo-sensors.json'))).mode & 0o777).toBe(0o600)
  })

  test('leaves a demo that is there as it is', async () => {
    const { code } = await site()
    const text = await rosterText()
    await lookAfter()
    expect((await site()).code).toBe(code)
    expect(await rosterText()).toBe(text)
  })

  test('gives a demo that lost its roster new secrets for the same sensors', async () => {
    const before = demoRosterSchema.parse(JSON.parse(await rosterText()))
    await rm(path.join(dataDir, 'demo-sensors.json'))
    await lookAfter()
    const after = demoRosterSchema.parse(JSON.parse(await rosterText()))
    expect(after.sensors.map(({ code, model }) => ({ code, model }))).toEqual(
      before.sensors.map(({ code, model }) => ({ code, model })),
    )
    const [sensor] = after.sensors
    const stored = await database.db
      .selectFrom('sensor')
      .where('code', '=', sensor?.code ?? '')
      .select('secret_hash')
      .executeTakeFirstOrThrow()
    expect(await isSensorSecret(sensor?.secret ?? '', stored.secret_hash ?? '')).toBe(true)
    expect(sensor?.secret).not.toBe(before.sensors[0]?.secret)
  })

  test('makes a demo anew that was not finished', async () => {
    const { code, id } = await site()
    await database.db.deleteFrom('change').where('site_id', '=', id).execute()
    await lookAfter()
    expect((await site()).code).not.toBe(code)
    expect(said).toContain('Removing a demo that was not finished')
  })

  test('takes away the demo and nothing else when it is reset', async () => {
    const { db } = database
    const before = await site()
    const maker = await userOf('maker@example.org')
    await db
      .insertInto('organization')
      .values({ id: 'other', name: 'Other', slug: 'other', logo: null, createdAt: now, metadata: null })
      .execute()
    await db
      .insertInto('site')
      .values({ code: 'ffffffffff', organization_id: 'other', name: 'Other', time_zone: 'UTC' })
      .execute()
    await db
      .insertInto('member')
      .values({ id: 'm', organizationId: 'other', userId: maker, role: 'owner', createdAt: now })
      .execute()
    const house = await userOf('house@example.org')

    await lookAfter(true)

    expect((await site()).code).not.toBe(before.code)
    const others = await db.selectFrom('site').where('is_demo', '=', false).select('code').execute()
    expect(others).toEqual([{ code: 'ffffffffff' }])
    // The maker has a site of their own by now and is kept; the house is made anew.
    expect(await userOf('maker@example.org')).toBe(maker)
    expect(await userOf('house@example.org')).not.toBe(house)
    const retired = await db.selectFrom('retired_code').where('code', '=', before.code).selectAll().execute()
    expect(retired).toHaveLength(1)
    expect(await db.selectFrom('reading').where('site_id', '=', before.id).selectAll().execute()).toEqual([])
  })

  test('makes no demo where somebody has a site already', async () => {
    const { id } = await site()
    await database.db.transaction().execute((trx) => deleteSite(trx, id, now))
    await lookAfter()
    expect(await database.db.selectFrom('site').where('is_demo', '=', true).selectAll().execute()).toEqual([])
  })

  test('does not bring back a demo that its owner took away, until it is asked to', async () => {
    const { db } = database
    await db.deleteFrom('organization').where('id', '=', 'other').execute()
    await lookAfter()
    expect(await db.selectFrom('site').selectAll().execute()).toEqual([])
    await lookAfter(true)
    expect((await site()).is_demo).toBe(true)
  })

  const byEmail = (a: { email: string }, b: { email: string }) => a.email.localeCompare(b.email)
  async function userOf(email: string): Promise<string> {
    const row = await database.db
      .selectFrom('user')
      .where('email', '=', email)
      .select('id')
      .executeTakeFirstOrThrow()
    return row.id
  }
})
