import { describe, expect, it } from 'vitest'
import type { PieceFit } from '@/lib/pieces/piece-fit'
import { choiceQuery, isJoined, type LidChoice, lidPresets, sameChoice, seenLid } from './lid-choice'

const room = (id: string, name: string, mcPct: number | null) => ({
  ...{ id, name, mark: 0, readAt: null },
  place: mcPct === null ? null : { ringMcPct: mcPct, lidMcPct: mcPct, doubtPct: 0.6 },
})

const fit: PieceFit = {
  at: '2026-03-05T13:00:00.000Z',
  lid: {
    kind: 'joint',
    joint: {
      ...{ diameterMm: 60, clearanceMm: 0.25, clearanceDoubtMm: 0.02, movementDoubt: 0.2, spigotOn: 'base' },
      movement: { tangentialPerPct: 0.0032, radialPerPct: 0.0017 },
      cut: { ringMcPct: 8.5, lidMcPct: 8.5 },
    },
    now: { ringMcPct: 8.9, lidMcPct: 8.8, doubtPct: 0.5 },
    cutDoubtPct: 0.5,
    isCutAssumed: false,
    words: '',
    assumed: [],
  },
  rooms: [room('cup', 'Cupboard', 8.5), room('shop', 'Shop', 13.6), room('van', 'Van', null)],
  stay: null,
  keepRoom: { id: 'cup', name: 'Cupboard', mark: 0 },
  isKeepRoomAssumed: false,
  year: [],
  cut: { kind: 'ask-diameter' },
}
if (!isJoined(fit)) throw new Error('no joint')
const joined = fit
const overnight: LidChoice = { kind: 'there', roomId: 'shop', stayMinutes: 840, cover: 'open' }

describe('what is offered', () => {
  it('is now, the room furthest off for 2 h and overnight, and the keep room given time', () => {
    expect(lidPresets(joined).map(({ label }) => label)).toEqual([
      ...['Now', 'Shop after 2 h', 'Shop overnight', 'Cupboard, given time'],
    ])
  })

  it('leaves out rooms without a fresh reading', () => {
    const silent = { ...joined, rooms: joined.rooms.map((one) => ({ ...one, place: null })) }
    expect(lidPresets(silent).map(({ key }) => key)).toEqual(['now'])
  })
})

describe('a choice', () => {
  it('asks the server only for a stay', () => {
    expect(choiceQuery({ kind: 'now' })).toBe('')
    expect(choiceQuery({ ...overnight, stayMinutes: null })).toBe('')
    expect(choiceQuery(overnight)).toBe('?room=shop&stayMinutes=840&cover=open')
  })

  it('of another cover is another', () => {
    expect(sameChoice(overnight, { ...overnight })).toBe(true)
    expect(sameChoice(overnight, { ...overnight, cover: 'bagged' })).toBe(false)
    expect(sameChoice(overnight, { kind: 'now' })).toBe(false)
  })
})

describe('the lid as chosen', () => {
  it('is shown beside how it was cut, or, elsewhere, how it is now', () => {
    expect(seenLid(joined, { kind: 'now' })).toMatchObject({
      words: 'Now: easy all the way round',
      other: { label: 'as it was cut' },
    })
    const shop = seenLid(joined, { ...overnight, stayMinutes: null })
    expect(shop).toMatchObject({
      words: 'In Shop, given time: easy, may bind, easy, may bind',
      other: { label: 'now' },
    })
    expect(shop?.joint.spigot.mcChangePct).toBeCloseTo(5.1, 6)
  })

  it('after a stay is drawn only when the answer for that very stay is there', () => {
    expect(seenLid(joined, overnight)).toBeUndefined()
    const stay = {
      ...{ room: { id: 'shop', name: 'Shop', mark: 0 }, stayMinutes: 840, cover: 'open' as const },
      place: { ringMcPct: 11, lidMcPct: 10, doubtPct: 0.8 },
    }
    expect(seenLid({ ...joined, stay }, overnight)?.joint.spigot.mcChangePct).toBeCloseTo(2.5, 6)
    expect(seenLid({ ...joined, stay: { ...stay, cover: 'bagged' } }, overnight)).toBeUndefined()
  })
})
