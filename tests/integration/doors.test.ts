import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { getDoorView } from '@/app/_server/door-view'
import { createDoor, listDoorViews, removeDoor } from '@/app/_server/doors'
import type { SiteMember } from '@/db/queries/members'
import { newCarrySchema } from '@/lib/carry/carry'
import { doorTokenSchema, doorViewSchema } from '@/lib/door/door'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
const at = { now, baseUrl: 'https://lidfast.example.org' }
let database: TestDatabase
let yard: Yard
let maker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
})
afterAll(() => database.drop())

const makeDoor = async () => {
  const made = valueOf(
    await createDoor(database.db, maker, { name: 'By the door', roomId: yard.shop.code }, at),
  )
  return { ...made, token: doorTokenSchema.parse(made.link.split('/').at(-1)) }
}

describe('the view by a door', () => {
  it('opens by its link alone, says what is out, and keeps a private piece to its number and time', async () => {
    const { token } = await makeDoor()
    const box = await yard.box('641')
    await database.db
      .updateTable('piece')
      .set({ is_private: true, owner_user_id: maker.userId, note: 'a present' })
      .where('site_id', '=', yard.siteId)
      .where('id', '=', box.id)
      .execute()
    const carry = newCarrySchema.parse({
      ...{ pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 60 },
      ...{ startsNow: true, againstAdvice: true },
    })
    valueOf(await createCarry(database.db, maker, carry, now))
    const view = valueOf(await getDoorView(database.db, token, now))
    expect(doorViewSchema.safeParse(view).error).toBeUndefined()
    expect(view.out).toHaveLength(1)
    expect(view.out[0]).toMatchObject({ number: '641', outline: 'round', since: 'open in work since 10:00' })
    expect(view.gap).toMatch(/^Landing cupboard \d\.\d\D+ Shop 1\d\.\d % MC|^Landing cupboard/)
    expect(JSON.stringify(view)).not.toContain('present')
  })

  it('is told to nobody after it was taken back, nor by a wrong secret, and leaves the others open', async () => {
    const first = await makeDoor()
    const second = await makeDoor()
    valueOf(await removeDoor(database.db, maker, first.id, now))
    expect((await getDoorView(database.db, first.token, now)).ok).toBe(false)
    expect((await getDoorView(database.db, 'A'.repeat(43), now)).ok).toBe(false)
    expect((await getDoorView(database.db, second.token, now)).ok).toBe(true)
    expect((await removeDoor(database.db, maker, first.id, now)).ok).toBe(false)
  })

  it('stores no secret, and notes when it was last looked at', async () => {
    const { id, token } = await makeDoor()
    const rows = await database.db.selectFrom('door_link').selectAll().execute()
    expect(JSON.stringify(rows)).not.toContain(token)
    expect((await listDoorViews(database.db, maker)).find((door) => door.id === id)?.lastSeenAt).toBeNull()
    await getDoorView(database.db, token, now)
    expect((await listDoorViews(database.db, maker)).find((door) => door.id === id)?.lastSeenAt).toBe(
      now.toISOString(),
    )
  })

  it('does not open for a room of another site', async () => {
    const other = await makeYard(database.db, now)
    const made = await createDoor(database.db, maker, { name: 'x', roomId: other.shop.code }, at)
    expect(made.ok).toBe(false)
  })
})
