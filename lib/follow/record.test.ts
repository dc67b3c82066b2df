import { describe, expect, it } from 'vitest'
import { airsOf, followHistory, followOn, type History, HOUR_MS, type RoomRecordOf } from './record'
import { partFilter } from './part'
import type { PieceFilter } from './wood-state'

const START = Date.UTC(2026, 1, 1)
const at = (hour: number): Date => new Date(START + hour * HOUR_MS)

const filter: PieceFilter = {
  ring: partFilter({ kind: 'ring', wallMm: 3, lengthMm: 6, grain: 'end-grain' }, 650),
  lid: partFilter({ kind: 'disc', thicknessMm: 8, grain: 'end-grain' }, 650),
}

/** House and shop with a record by the hour; the shop's has a hole of a day. */
const rooms: RoomRecordOf = (roomId) => {
  const hours = new Map<number, { emcPct: number; temperatureC: number }>()
  for (let hour = -24 * 90; hour < 24 * 60; hour += 1) {
    if (roomId === 2 && hour >= 240 && hour < 264) continue
    const day = Math.sin((hour / 24) * 2 * Math.PI)
    hours.set(
      START + hour * HOUR_MS,
      roomId === 1
        ? { emcPct: 8.5 + 0.2 * day, temperatureC: 19 }
        : { emcPct: 13.5 + 0.8 * day, temperatureC: 9 },
    )
  }
  return { hours, emcPctMean: roomId === 1 ? 8.6 : 13 }
}

const history = (over: Partial<History> = {}): History => ({
  filter,
  stays: [
    { roomId: 1, fromAt: at(0), toAt: at(230.4), cover: 'closed' },
    { roomId: 2, fromAt: at(230.4), toAt: at(270.1), cover: 'open' },
    { roomId: 1, fromAt: at(270.1), toAt: null, cover: 'closed' },
  ],
  roomOf: rooms,
  untilMs: at(300).getTime(),
  outAtMs: null,
  measured: [],
  diffusionFactor: 1,
  beforeMs: 30 * 24 * HOUR_MS,
  ...over,
})

const followed = (over: Partial<History> = {}) => {
  const made = followHistory(history(over))
  if (made === undefined) throw new Error('its air is known')
  return made
}

describe('the air that a piece met', () => {
  it('is cut by the hour and where it moved, and a gap holds the last air known, marked', () => {
    const airs = airsOf(history().stays, rooms, at(0).getTime(), at(300).getTime())
    expect(airs[0]).toMatchObject({ at: at(0).getTime(), cover: 'closed', isKnown: true })
    expect(airs.some((air) => air.at === at(230.4).getTime() && air.cover === 'open')).toBe(true)
    const gap = airs.filter((air) => !air.isKnown)
    expect(gap).toHaveLength(24)
    expect(new Set(gap.map((air) => air.emcPct)).size).toBe(1)
    expect(airs.every((air, n) => n === 0 || air.at > (airs[n - 1]?.at ?? 0))).toBe(true)
  })

  it('beyond three days without a reading is the room’s own mean', () => {
    const none = airsOf(
      [{ roomId: 2, fromAt: at(0), toAt: null, cover: 'open' }],
      () => ({ hours: new Map(), emcPctMean: 13 }),
      at(0).getTime(),
      at(3).getTime(),
    )
    expect(none.map((air) => [air.emcPct, air.isKnown])).toEqual([
      [13, false],
      [13, false],
      [13, false],
    ])
  })

  it('of which nothing at all is known is nothing, never a guess', () => {
    const made = followHistory(history({ roomOf: () => ({ hours: new Map(), emcPctMean: null }) }))
    expect(made).toBeUndefined()
  })
})

describe('following a record', () => {
  it('a day in the shop shows, and is forgotten again at home', () => {
    const inShop = followed({ untilMs: at(270).getTime() })
    const later = followed({ untilMs: at(900).getTime() })
    expect(inShop.state.ringPct).toBeGreaterThan(11)
    expect(later.state.ringPct).toBeLessThan(9)
    expect(later.state.ringPct).toBeGreaterThan(8.2)
  })

  it('a gap is never "unchanged": it widens the doubt of the wood', () => {
    const withGap = followed({ untilMs: at(264).getTime() })
    const before = followed({ untilMs: at(239).getTime() })
    expect(withGap.state.unknownShare).toBeGreaterThan(before.state.unknownShare + 0.1)
  })

  it('the time before the record counts as not known, less the longer ago it is', () => {
    const soon = followed({ untilMs: at(2).getTime() }).state.unknownShare
    const later = followed({ untilMs: at(200).getTime() }).state.unknownShare
    expect(soon).toBeGreaterThan(0.8)
    expect(later).toBeLessThan(0.5 * soon)
  })

  it('is the same whether followed at once or carried on hour by hour', () => {
    const whole = followed({ untilMs: at(320).getTime(), outAtMs: at(230.4).getTime() })
    let piecewise = followed({ untilMs: at(200).getTime(), outAtMs: null })
    for (let hour = 201; hour <= 320; hour += 1) {
      const untilMs = at(hour).getTime()
      piecewise = followOn(filter, piecewise, {
        airs: airsOf(history().stays, rooms, piecewise.atMs, untilMs),
        untilMs,
        outAtMs: hour >= 231 ? at(230.4).getTime() : null,
        diffusionFactor: 1,
      })
    }
    expect(piecewise.state.ringPct).toBeCloseTo(whole.state.ringPct, 9)
    expect(piecewise.state.lidPct).toBeCloseTo(whole.state.lidPct, 9)
    expect(piecewise.state.unknownShare).toBeCloseTo(whole.state.unknownShare, 9)
    expect(piecewise.outState?.ringPct).toBeCloseTo(whole.outState?.ringPct ?? NaN, 9)
  })

  it('keeps the wood as it was when the piece went out', () => {
    const made = followed({ untilMs: at(260).getTime(), outAtMs: at(230.4).getTime() })
    expect(made.outAtMs).toBe(at(230.4).getTime())
    expect(made.outState?.ringPct).toBeLessThan(9)
    expect(made.state.ringPct).toBeGreaterThan(11)
  })

  it('a measurement corrects what was reckoned, the better it is the more', () => {
    const plain = followed().state.ringPct
    const at290 = at(290).getTime()
    const byWeight = followed({ measured: [{ at: at290, mcPct: plain + 2, doubtPct: 0.3 }] }).state
    const byMeter = followed({ measured: [{ at: at290, mcPct: plain + 2, doubtPct: 2 }] }).state
    expect(byWeight.ringPct).toBeGreaterThan(byMeter.ringPct)
    expect(byMeter.ringPct).toBeGreaterThan(plain)
    expect(byWeight.ringPct).toBeLessThan(plain + 2)
    expect(byWeight.unknownShare).toBeLessThan(followed().state.unknownShare)
  })
})
