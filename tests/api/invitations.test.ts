import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { newTextId } from '@/db/queries/sites'
import type { Problem } from '@/lib/api/problems'
import type { Invitation, Site } from '@/lib/sites/site'
import { makeSite, type WorldSite } from '../support/api-world'
import { mailsTo, mailTo } from '../support/mails'
import { call, openStackDatabase, signedInPerson, type Person } from '../support/session'

const db = openStackDatabase()
let owner: Person
let site: WorldSite
beforeAll(async () => {
  owner = await signedInPerson(db, 'Owner')
  const [maker, hand, onlooker] = await Promise.all(
    ['Maker', 'Hand', 'Onlooker'].map((name) => signedInPerson(db, name)),
  )
  if (!maker || !hand || !onlooker) throw new Error('people are missing')
  site = await makeSite(db, {
    owner: owner.userId,
    maker: maker.userId,
    hand: hand.userId,
    onlooker: onlooker.userId,
  })
})
afterAll(() => db.destroy())

const invitations = () => `/api/v1/sites/${site.things.site}/invitations`
const invite = (email: string, role = 'hand') =>
  call('POST', invitations(), { cookie: owner.cookie, body: { email, role } })
const accept = (id: string, { cookie }: Person) =>
  call('POST', `/api/v1/invitations/${id}/accept`, { cookie })
const seeSite = async ({ cookie }: Person) =>
  (await call('GET', `/api/v1/sites/${site.things.site}`, { cookie })).status
const invited = async (role = 'hand') => {
  const guest = await signedInPerson(db, 'Guest')
  const { id } = (await invite(guest.email, role)).json<Invitation>()
  return { guest, id }
}

describe('an invitation', () => {
  it('comes by mail with a link of the configured address, and makes a member with that role', async () => {
    const guest = await signedInPerson(db, 'Guest')
    const made = await invite(guest.email.toUpperCase().replace('@EXAMPLE.ORG', '@example.org'), 'maker')
    expect(made.status).toBe(201)
    const { id, state } = made.json<Invitation>()
    expect(state).toBe('waiting')
    const mail = await mailTo(db, guest.email, `An invitation to ${site.siteName}`)
    expect(mail.link).toBe(`${inject('stack').webUrl}/invitation/${id}`)

    expect(await seeSite(guest)).toBe(404)
    const seen = await call('GET', `/api/v1/invitations/${id}`, { cookie: guest.cookie })
    expect(seen.json()).toMatchObject({ siteName: site.siteName, role: 'maker', email: guest.email })
    const accepted = await accept(id, guest)
    expect([accepted.status, accepted.json<Site>().role]).toEqual([200, 'maker'])
    expect(await seeSite(guest)).toBe(200)
    const { items } = (await call('GET', invitations(), { cookie: owner.cookie })).json<{
      items: Invitation[]
    }>()
    expect(items.map((invitation) => invitation.id)).not.toContain(id)
  })

  it('is good once, also when it is taken up many times at the same moment', async () => {
    const { guest, id } = await invited()
    const replies = await Promise.all([accept(id, guest), accept(id, guest), accept(id, guest)])
    expect(replies.filter((reply) => reply.status === 200).length).toBe(1)
    expect(replies.filter((reply) => reply.status === 422).length).toBe(2)
    const rows = await db.selectFrom('member').where('userId', '=', guest.userId).select('role').execute()
    expect(rows).toEqual([{ role: 'hand' }])
    // Whoever was taken out again does not come back by the old link.
    await db.deleteFrom('member').where('userId', '=', guest.userId).execute()
    expect((await accept(id, guest)).json<Problem>().type).toBe('/problems/invitation-over')
    expect(await seeSite(guest)).toBe(404)
  })

  it('is of no use to anybody at another address, and does not tell them for whom it is', async () => {
    const { guest, id } = await invited()
    const stranger = await signedInPerson(db, 'Stranger')
    for (const reply of [
      await accept(id, stranger),
      await call('GET', `/api/v1/invitations/${id}`, { cookie: stranger.cookie }),
    ]) {
      expect([reply.status, reply.json<Problem>().type]).toEqual([403, '/problems/other-address'])
      expect(reply.text).not.toContain(guest.email)
      expect(reply.text).not.toContain(site.siteName)
    }
    expect(await seeSite(stranger)).toBe(404)
    expect((await accept(id, guest)).status).toBe(200)
  })

  it.each([
    ['withdrawn', { status: 'canceled' }],
    ['too old', { expiresAt: new Date(Date.now() - 1_000) }],
    ['for a role that does not exist', { role: 'emperor' }],
    ['for no role', { role: null }],
    ['for several roles', { role: 'owner,maker' }],
  ])('that is %s makes no member and says why', async (_words, stored) => {
    const { guest, id } = await invited()
    await db.updateTable('invitation').set(stored).where('id', '=', id).execute()
    const refused = await accept(id, guest)
    expect([refused.status, refused.json<Problem>().type]).toEqual([422, '/problems/invitation-over'])
    expect(refused.json<Problem>().detail).toMatch(/[a-z]{4}.*\./)
    expect(await seeSite(guest)).toBe(404)
  })

  it('that was re-addressed is good for the new address only', async () => {
    const { guest, id } = await invited()
    const other = await signedInPerson(db, 'Other')
    await db.updateTable('invitation').set({ email: other.email }).where('id', '=', id).execute()
    expect((await accept(id, guest)).status).toBe(403)
    expect((await accept(id, other)).status).toBe(200)
  })

  it('is withdrawn by the owner, and then gone', async () => {
    const { guest, id } = await invited()
    const withdraw = () => call('DELETE', `${invitations()}/${id}`, { cookie: owner.cookie })
    expect((await withdraw()).status).toBe(204)
    expect((await withdraw()).status).toBe(404)
    expect((await accept(id, guest)).status).toBe(422)
  })

  it('gets another week when it is sent again', async () => {
    const { guest, id } = await invited()
    await db
      .updateTable('invitation')
      .set({ expiresAt: new Date(Date.now() - 1_000) })
      .where('id', '=', id)
      .execute()
    const renewed = await call('POST', `${invitations()}/${id}/resend`, { cookie: owner.cookie })
    expect(renewed.json<Invitation>().state).toBe('waiting')
    await mailTo(db, guest.email, 'An invitation to')
    expect((await accept(id, guest)).status).toBe(200)
  })
})

describe('inviting', () => {
  it.each(['emperor', '', 'Owner', 'owner,maker', ['owner']])('refuses the role %j', async (role) => {
    const refused = await call('POST', invitations(), {
      cookie: owner.cookie,
      body: { email: 'x@example.org', role },
    })
    expect([refused.status, refused.json<Problem>().errors?.[0]?.path]).toEqual([400, 'role'])
  })

  it.each(['no address', 'a@example.org\r\nBcc: b@example.org', 'a@b', `${'a'.repeat(260)}@example.org`])(
    'refuses the address %j and sends nothing',
    async (email) => {
      expect((await invite(email)).status).toBe(400)
      expect(await mailsTo(db, email)).toEqual([])
    },
  )

  it('is refused for a member and for somebody invited already, and names the field', async () => {
    const { guest, id } = await invited()
    const again = await invite(guest.email)
    expect([again.status, again.json<Problem>().errors?.[0]?.path]).toEqual([409, 'email'])
    await accept(id, guest)
    expect((await invite(guest.email)).status).toBe(409)
    expect((await invite(owner.email)).status).toBe(409)
  })

  it('of one address by many presses at once makes one invitation', async () => {
    const email = `pressed.${newTextId().slice(0, 12).toLowerCase()}@example.org`
    const replies = await Promise.all([invite(email), invite(email), invite(email)])
    expect(replies.map((reply) => reply.status).toSorted()).toEqual([201, 409, 409])
  })
})
