import { describe, expect, it } from 'vitest'
import { FORECAST_HOURS, type RoomForecast } from '@/lib/forecast/room-forecast'
import { typicalBox } from '@/lib/forecast/typical-box'
import { betterWays } from './better-ways'
import type { CarryMaterial, RoomMaterial } from './material'

const HOUR_MS = 3_600_000
const madeAt = Date.parse('2026-03-05T13:00:00Z')
const now = new Date(madeAt + 10 * 60_000)
const HOUSE = 1
const SHOP = 2
const TIGHT = 10
const LOOSE = 11
/** From this hour of the forecast on the shop is as dry as the house. */
const DRY_FROM = 30
const codeOf = new Map([
  [TIGHT, 'tight'],
  [LOOSE, 'loose'],
])

function forecast(dryFrom: number): RoomForecast {
  const all = <Value>(value: Value) => Array.from({ length: FORECAST_HOURS }, () => value)
  const emcPct = all(15).map((damp, n) => (n >= dryFrom ? 8.6 : damp))
  return {
    madeAt,
    temperatureC: all(8),
    humidityPct: all(70),
    emcPct,
    emcPctLow: emcPct.map((value) => value - 0.3),
    emcPctHigh: emcPct.map((value) => value + 0.3),
    method: all('record' as const),
    recordPct: emcPct,
    sameAsNowPct: 15,
    yesterdayPct: emcPct,
    usesOutdoors: false,
    usesLastYear: false,
    warmed: null,
  }
}

const room = (emcPct: number, ahead: RoomForecast | null): RoomMaterial => ({
  air: {
    kind: 'fresh',
    at: now.toISOString(),
    ageS: 60,
    temperatureC: 8,
    humidityPct: 70,
    emcPct,
    emcDoubtPct: 0.5,
    dewPointC: 3,
    isTyped: false,
    flags: [],
  },
  hours: new Map(),
  emcPctMean: emcPct,
  forecast: ahead,
})

function materialWith(ahead: RoomForecast | null): CarryMaterial {
  const box = typicalBox(HOUSE)
  return {
    now,
    pieces: new Map([
      [TIGHT, { ...box, facts: { ...box.facts, number: '219' } }],
      [LOOSE, { ...box, facts: { ...box.facts, allowanceMm: 2, number: '226' } }],
    ]),
    rooms: new Map([
      [HOUSE, room(8.5, null)],
      [SHOP, room(15, ahead)],
    ]),
  }
}

const asked = {
  pieceIds: [LOOSE, TIGHT],
  toRoomId: SHOP,
  stayMinutes: 180,
  cover: 'open' as const,
  startsAt: now,
}

describe('the same carry at a better hour', () => {
  it('is the first hour at which the least forgiving piece is fine, with a verdict for each', () => {
    const { betterHour, keeps } = betterWays(materialWith(forecast(DRY_FROM)), asked, codeOf)
    expect(Date.parse(betterHour?.startsAt ?? '')).toBeGreaterThanOrEqual(madeAt + DRY_FROM * HOUR_MS)
    expect(betterHour?.ifLitAt).toBeNull()
    expect(betterHour?.pieces.map(({ id, verdict }) => [id, verdict])).toEqual([
      ['loose', 'fine'],
      ['tight', 'fine'],
    ])
    expect(keeps?.id).toBe('tight')
    const [first] = keeps?.hours ?? []
    expect(first?.verdict).not.toBe('fine')
    expect(keeps?.hours.at(-1)?.verdict).toBe('fine')
    const moments = keeps?.hours.map(({ at }) => at)
    expect(moments).toEqual(moments?.toSorted())
  })

  it('is none where no hour is better, and the hours are told all the same', () => {
    const { betterHour, keeps } = betterWays(materialWith(forecast(FORECAST_HOURS)), asked, codeOf)
    expect(betterHour).toBeNull()
    expect(keeps?.hours.length).toBeGreaterThan(40)
  })

  it('is none where it is fine as asked', () => {
    const loose = { ...asked, pieceIds: [LOOSE] }
    expect(betterWays(materialWith(forecast(DRY_FROM)), loose, codeOf).betterHour).toBeNull()
  })

  it('is none without a forecast', () => {
    expect(betterWays(materialWith(null), asked, codeOf)).toEqual({
      hours: [],
      betterHour: null,
      keeps: null,
    })
  })
})
