import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { changePiece, createPiece } from '@/app/_server/piece-changes'
import { getPiece, listPieces, piecesQuerySchema } from '@/app/_server/pieces'
import { archiveWood, changeWood, createWood, restoreWood } from '@/app/_server/wood-changes'
import { getWood, listWoods, offeredWoods, woodsQuerySchema } from '@/app/_server/woods'
import type { SiteMember } from '@/db/queries/members'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { findPiece } from '@/db/queries/pieces'
import { listSiteWoods } from '@/db/queries/site-woods'
import { jointOfPiece } from '@/lib/carry/joint-defaults'
import { newPieceSchema } from '@/lib/pieces/piece'
import { movementOfWood, woodMovement } from '@/lib/wood/movement-class'
import { newSiteWoodSchema, resolveWood } from '@/lib/wood/site-wood'
import { SPECIES } from '@/lib/wood/species'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let neighbour: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now, { readHours: 1 })
  maker = await yard.member('maker')
  neighbour = await (await makeYard(database.db, now, { readHours: 1 })).member('owner')
})
afterAll(() => database.drop())

const wood = (input: object) => newSiteWoodSchema.parse(input)
const make = async (input: object, as = maker) => valueOf(await createWood(database.db, as, wood(input), now))
const list = async (query: Record<string, string>, as = maker) =>
  valueOf(await listWoods(database.db, as, woodsQuerySchema.parse(query)))
const names = async (query: Record<string, string>, as = maker) =>
  (await list(query, as)).items.map((one) => one.commonName)
const piece = (number: string, of: string) =>
  newPieceSchema.parse({
    ...{ number, wood: of, jointDiameterMm: 60, fitGrade: 'snug', roomId: yard.cupboard.code },
  })

describe("a site's own wood", () => {
  it('is found and reckoned with here, and is not there for another site', async () => {
    const own = await make({
      ...{ commonName: 'Hedge ash', latinName: 'Fraxinus excelsior', movementClass: 'large' },
      ...{ radialPerPct: 0.0021, tangentialPerPct: 0.0034, source: 'measured here, 2026' },
    })
    expect(own).toMatchObject({
      ...{ isOwn: true, status: 'site', version: 1, source: 'measured here, 2026' },
      reckoned: { radialPerPct: 0.0021, tangentialPerPct: 0.0034, densityKgM3: 650, assumed: ['density'] },
    })
    expect((await names({ q: 'HEDGE ash' }))[0]).toBe('Hedge ash')
    expect(valueOf(await getWood(database.db, maker, own.slug))).toEqual(own)

    expect(await names({ q: 'hedge' }, neighbour)).toEqual([])
    const refusals = [
      await getWood(database.db, neighbour, own.slug),
      await changeWood(database.db, neighbour, own.slug, 1, { note: 'mine' }),
      await archiveWood(database.db, neighbour, own.slug, 1, now),
      await restoreWood(database.db, neighbour, own.slug),
    ]
    for (const refusal of refusals) expect(refusal).toMatchObject({ ok: false, error: { code: 'not-found' } })
    expect(valueOf(await getWood(database.db, maker, own.slug))).toEqual(own)
    await make({ commonName: 'Hedge ash' }, neighbour)
  })

  it('has a name of its own, whatever its letters, for two at once as well', async () => {
    await make({ commonName: 'Blackthorn' })
    const create = (commonName: string) => createWood(database.db, maker, wood({ commonName }), now)
    const taken = { ok: false, error: { code: 'name-taken', errors: [{ path: 'commonName' }] } }
    expect(await create('BLACKTHORN')).toMatchObject(taken)
    expect(await create('ash, european')).toMatchObject(taken)
    const both = await Promise.all(['Quince', 'Quince'].map(create))
    expect(both.filter((one) => one.ok)).toHaveLength(1)
  })

  it('is changed by one writer at a time, and who changed what is kept', async () => {
    const plum = await make({ commonName: 'Plum', radialPerPct: 0.0015, tangentialPerPct: 0.0026 })
    const first = valueOf(await changeWood(database.db, maker, plum.slug, 1, { densityKgM3: 760 }))
    expect(first).toMatchObject({ densityKgM3: 760, densityStatus: 'site', version: 2 })
    expect(await changeWood(database.db, maker, plum.slug, 1, { note: 'late' })).toMatchObject({
      ok: false,
      error: { code: 'changed-meanwhile', version: 2, current: { densityKgM3: 760 } },
    })
    expect(await changeWood(database.db, maker, plum.slug, 2, { radialPerPct: null })).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'radialPerPct' }] },
    })
    const changes = await database.db
      .selectFrom('change')
      .where('subject_kind', '=', 'wood')
      .where('subject_code', '=', plum.slug.replace('own-', ''))
      .select(['action', 'before', 'after', 'user_id'])
      .orderBy('id')
      .execute()
    expect(changes).toMatchObject([
      { action: 'create', user_id: maker.userId },
      { action: 'change', before: { densityKgM3: null }, after: { densityKgM3: 760 } },
    ])
  })

  it('is offered no more once put away, stays with its pieces, and comes out again', async () => {
    const rowan = await make({ commonName: 'Rowan, top field', latinName: 'Sorbus aucuparia' })
    const made = valueOf(await createPiece(database.db, maker, piece('R1', rowan.slug), now))
    expect(made).toMatchObject({ title: 'Rowan box', woodName: 'Rowan, top field' })
    valueOf(await archiveWood(database.db, maker, rowan.slug, rowan.version, now))
    expect(await names({ q: 'rowan' })).toEqual([])
    expect(await names({ away: 'yes' })).toEqual(['Rowan, top field'])

    expect(valueOf(await getPiece(database.db, maker, made.id, now)).title).toBe('Rowan box')
    expect(resolveWood(rowan.slug, await listSiteWoods(database.db, yard.siteId))?.commonName).toBe(
      'Rowan, top field',
    )
    const change = { finish: 'oil', wood: rowan.slug }
    valueOf(await changePiece(database.db, maker, made.id, made.version, change, now))
    expect(await createPiece(database.db, maker, piece('R2', rowan.slug), now)).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'wood' }] },
    })
    expect(valueOf(await restoreWood(database.db, maker, rowan.slug)).isArchived).toBe(false)
    valueOf(await createPiece(database.db, maker, piece('R2', rowan.slug), now))
  })

  it('does not come out again under a name that another has by now', async () => {
    const first = await make({ commonName: 'Damson' })
    valueOf(await archiveWood(database.db, maker, first.slug, 1, now))
    await make({ commonName: 'damson' })
    expect(await restoreWood(database.db, maker, first.slug)).toMatchObject({
      ok: false,
      error: { code: 'name-taken' },
    })
  })

  it('makes pieces that are found by its name, with its dust and its protection', async () => {
    const own = await make({ commonName: 'Old fiddle back', latinName: 'Dalbergia sissoo' })
    const made = valueOf(await createPiece(database.db, maker, piece('V1', own.slug), now))
    expect(made.dust.map((note) => note.text).join(' ')).toMatch(/dermatitis/)
    expect(made.cautions.join(' ')).toMatch(/CITES Appendix II.*from memory, 2026-12-01.*national authority/)
    const found = async (q: string) =>
      valueOf(await listPieces(database.db, maker, piecesQuerySchema.parse({ q }))).items.map(
        (one) => one.number,
      )
    expect(await found('fiddle')).toEqual(['V1'])
    expect(await found('sissoo')).toEqual(['V1'])
  })

  it('is what its pieces are worked out by', async () => {
    const figures = { radialPerPct: 0.001, tangentialPerPct: 0.009 }
    const lively = await make({ commonName: 'Lively', ...figures })
    const made = valueOf(await createPiece(database.db, maker, piece('L1', lively.slug), now))
    expect(made.assumed).toContain('density 650 kg/m³')
    expect(made.assumed.join(' ')).not.toMatch(/wood not known/)
    const still = valueOf(await createPiece(database.db, maker, piece('L2', 'tectona-grandis'), now))
    const lossMmPerPct = async (code: string) => {
      const found = await findPiece(database.db, yard.siteId, code, { userId: maker.userId, role: 'maker' })
      const id = found?.id ?? 0
      const facts = (await loadCarryMaterial(database.db, maker, [id], [], now)).pieces.get(id)?.facts
      return facts && jointOfPiece(facts)?.lossMmPerPct
    }
    // 60 mm times the difference of the two directions, for each point.
    expect(await lossMmPerPct(made.id)).toBeCloseTo(60 * 0.008, 3)
    expect(await lossMmPerPct(still.id)).toBeCloseTo(60 * 0.00116, 3)
  })

  it('of another site makes no piece', async () => {
    const theirs = await make({ commonName: 'Medlar' }, neighbour)
    expect(await createPiece(database.db, maker, piece('M1', theirs.slug), now)).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'wood' }] },
    })
  })
})

describe("a site's own figures for a wood of the table", () => {
  const slug = 'acer-pseudoplatanus'
  const own = { radialPerPct: 0.0016, tangentialPerPct: 0.0033 }
  const reckoned = async (member: SiteMember) => {
    const { db } = database
    return movementOfWood(resolveWood(slug, await listSiteWoods(db, member.siteId)))
  }

  it('count at that site alone, until they are put away', async () => {
    expect(await changeWood(database.db, maker, slug, 0, own)).toMatchObject({
      ok: false,
      error: { code: 'not-possible' },
    })
    const over = await make({ overrides: slug, ...own, source: 'six discs, weighed and measured' })
    expect(over).toMatchObject({ slug, isOwn: false, isOverridden: true, status: 'site', version: 1 })
    expect(await reckoned(maker)).toMatchObject({ ...own, densityKgM3: 640, status: 'site' })
    expect(await reckoned(neighbour)).toEqual(woodMovement(slug))
    const offered = await offeredWoods(database.db, yard.siteId)
    expect(offered.filter((one) => one.slug === slug)).toMatchObject([{ isOverridden: true, ...own }])

    expect(await createWood(database.db, maker, wood({ overrides: slug, ...own }), now)).toMatchObject({
      ok: false,
      error: { code: 'already-done' },
    })
    expect(await changeWood(database.db, maker, slug, 1, { commonName: 'My sycamore' })).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'commonName' }] },
    })
    valueOf(await archiveWood(database.db, maker, slug, 1, now))
    expect(await reckoned(maker)).toEqual(woodMovement(slug))
    expect(valueOf(await getWood(database.db, maker, slug))).toMatchObject({
      isOverridden: false,
      version: 0,
    })
    valueOf(await restoreWood(database.db, maker, slug))
    expect(await reckoned(maker)).toMatchObject(own)
  })

  it('are refused for a wood that the table has not', async () => {
    const outcome = await createWood(database.db, maker, wood({ overrides: 'lignum-fictum', ...own }), now)
    expect(outcome).toMatchObject({ ok: false, error: { errors: [{ path: 'overrides' }] } })
  })
})

describe('the list of woods', () => {
  it('goes on where the page before it ended, each wood once', async () => {
    const seen: string[] = []
    let cursor: string | null = null
    do {
      const query: Record<string, string> = { limit: '17', ...(cursor === null ? {} : { cursor }) }
      const page = await list(query, neighbour)
      seen.push(...page.items.map((one) => one.slug))
      cursor = page.nextCursor
    } while (cursor !== null)
    expect(new Set(seen).size).toBe(seen.length)
    expect(seen).toHaveLength(SPECIES.length + 2)
    expect(seen.slice(0, 2).every((slug) => slug.startsWith('own-'))).toBe(true)
    expect(
      await listWoods(database.db, maker, woodsQuerySchema.parse({ cursor: 'bWFkZS11cA' })),
    ).toMatchObject({ ok: false, error: { code: 'malformed' } })
  })

  it('takes burr and burl alike for wild grain', async () => {
    for (const q of ['burr walnut', 'walnut burl']) {
      const found = await list({ q })
      expect(found.suggestedKind).toBe('wild')
      expect(found.items.map((one) => one.slug).toSorted()).toEqual(['juglans-nigra', 'juglans-regia'])
    }
    expect((await list({ q: 'ash' })).suggestedKind).toBeNull()
  })
})
