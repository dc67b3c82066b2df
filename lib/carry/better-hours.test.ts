import { beforeAll, describe, expect, it } from 'vitest'
import { hourStrip } from '@/lib/forecast/hour-strip'
import { FORECAST_HOURS, type RoomForecast } from '@/lib/forecast/room-forecast'
import { typicalBox } from '@/lib/forecast/typical-box'
import { betterHours, judgedHours } from './better-hours'
import { aheadDoubtPct } from './forecast'
import { airOfHour, carryCheckInput, type CarryMaterial, type RoomMaterial } from './material'
import { usualHours } from './usual-hours'

const HOUR_MS = 3_600_000
const madeAt = Date.parse('2026-03-05T13:00:00Z')
const now = new Date(madeAt + 10 * 60_000)
const HOUSE = 1
const SHOP = 2
const BOX = 10
const STURDY = 11

/** Damp all day but for some hours; lit from 08:00 tomorrow it is drier still. */
function forecastWith(dampPct: number, over: Partial<RoomForecast> = {}): RoomForecast {
  const all = (value: number) => Array.from({ length: FORECAST_HOURS }, () => value)
  const emcPct = all(dampPct).map((value, n) => (n >= 44 ? 8.7 : value))
  return {
    madeAt,
    temperatureC: all(8),
    humidityPct: all(70),
    emcPct,
    emcPctLow: emcPct.map((value, n) => value - 0.01 * n),
    emcPctHigh: emcPct.map((value, n) => value + 0.01 * n),
    method: Array.from({ length: FORECAST_HOURS }, () => 'record' as const),
    recordPct: emcPct,
    sameAsNowPct: dampPct,
    yesterdayPct: emcPct,
    usesOutdoors: false,
    usesLastYear: false,
    warmed: null,
    ...over,
  }
}

/** Lit at eight tomorrow: 19 hours after the forecast's first. */
const lit = (): NonNullable<RoomForecast['warmed']> => {
  const within = (value: number) =>
    Array.from({ length: FORECAST_HOURS }, (_, n) => (n >= 19 && n < 31 ? value : null))
  return {
    litAtTime: '08:00',
    litAt: [madeAt + 19 * HOUR_MS],
    warmings: 14,
    lengthHours: 12,
    temperatureC: within(15),
    emcPct: within(8.9),
    emcPctLow: within(8.5),
    emcPctHigh: within(9.3),
  }
}

function room(emcPct: number, forecast: RoomForecast | null): RoomMaterial {
  const hours = new Map(
    Array.from({ length: 7 * 24 }, (_, n) => [madeAt - (n + 1) * HOUR_MS, { emcPct, temperatureC: 8 }]),
  )
  return {
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
    hours,
    emcPctMean: emcPct,
    forecast,
  }
}

let damp: CarryMaterial
const materialWith = (forecast: RoomForecast | null): CarryMaterial => {
  const box = typicalBox(HOUSE)
  const sturdy = { ...box, facts: { ...box.facts, allowanceMm: 2, number: '226' } }
  return {
    now,
    pieces: new Map([
      [BOX, { ...box, facts: { ...box.facts, number: '219' } }],
      [STURDY, sturdy],
    ]),
    rooms: new Map([
      [HOUSE, room(8.5, null)],
      [SHOP, room(15, forecast)],
    ]),
  }
}
const asked = { pieceIds: [STURDY, BOX], toRoomId: SHOP, stayMinutes: 180, cover: 'open' as const }
const strip = (material: CarryMaterial, pieceIds: number[] = []) =>
  hourStrip(material, { roomId: SHOP, pieceIds, keepRoomId: HOUSE, timeZone: 'Europe/London' })

beforeAll(() => {
  damp = materialWith(forecastWith(15, { warmed: lit() }))
})

describe('better hours', () => {
  it('stand best first, an unlit hour before one as good that has to be lit', () => {
    const hours = betterHours(damp, asked)
    expect(hours[0]?.worst).toBe('fine')
    expect(hours[0]?.startsAt).toBe(new Date(madeAt + 44 * HOUR_MS).toISOString())
    expect(hours[0]?.ifLitAt).toBeNull()
    const firstLit = hours.find((hour) => hour.ifLitAt !== null)
    expect(firstLit?.ifLitAt).toBe(new Date(madeAt + 19 * HOUR_MS).toISOString())
    expect(firstLit?.worst).toBe('fine')
    expect(hours.at(-1)?.worst).not.toBe('fine')
    expect(hours.every((hour) => new Date(hour.startsAt) >= now)).toBe(true)
  })

  it('are judged by the least forgiving piece, with a verdict for each', () => {
    const [damped] = judgedHours(damp, asked)
    expect(damped?.asItIs.verdicts.map((one) => one.pieceId)).toEqual([STURDY, BOX])
    const [sturdy, box] = damped?.asItIs.verdicts ?? []
    expect(sturdy?.verdict).toBe('fine')
    expect(damped?.asItIs.worst).toBe(box?.verdict)
    expect(damped?.asItIs.worst).not.toBe('fine')
  })

  it('are none without a forecast; what is usual past it is told for each day', () => {
    const none = materialWith(null)
    expect(betterHours(none, asked)).toEqual([])
    const usual = usualHours(none, { ...asked, timeZone: 'Europe/London' })
    expect(usual.length).toBeGreaterThan(3)
    expect(usual.every((hour) => Date.parse(hour.startsAt) >= madeAt + 48 * HOUR_MS)).toBe(true)
  })
})

describe('the strip of hours', () => {
  it('calls hours fit as they are and if lit, by a typical box where none is chosen', () => {
    const { kind, cells, lit: told, note } = strip(damp)
    expect(kind).toBe('forecast')
    expect(cells).toHaveLength(FORECAST_HOURS)
    expect(cells[10]?.state).not.toBe('fit')
    expect(cells[22]?.ifLit?.state).toBe('fit')
    expect(cells[30]?.ifLit?.state).not.toBe('fit')
    expect(cells[44]?.state).toBe('fit')
    expect(told).toEqual({ atTime: '08:00', warmings: 14 })
    expect(note).toContain('a typical box')
    expect(strip(damp, [BOX, STURDY]).note).toContain('Judged by 219, the least forgiving of 2 boxes')
  })

  it('repeats the last two days without a forecast, and calls none of them fit', () => {
    const none = materialWith(null)
    const dry = { ...none, rooms: new Map(none.rooms).set(SHOP, room(8.5, null)) }
    const { kind, cells } = strip(dry)
    expect(kind).toBe('repeated')
    expect(cells.length).toBeGreaterThan(40)
    expect(cells.every((cell) => cell.state === 'tolerable')).toBe(true)
  })

  it('says nothing of a room that has fallen silent', () => {
    const shop = room(15, forecastWith(15))
    const stale = { ...shop, air: { ...shop.air, kind: 'stale' as const } } as RoomMaterial
    expect(strip({ ...damp, rooms: new Map(damp.rooms).set(SHOP, stale) }).cells).toEqual([])
  })
})

describe('the air of a stay', () => {
  it('goes from what is read now to the forecast within six hours, and past it to its last day', () => {
    const material = materialWith(forecastWith(13))
    expect(airOfHour(material, SHOP, now.getTime())?.emcPct).toBeCloseTo(15, 9)
    const after = airOfHour(material, SHOP, now.getTime() + 3 * HOUR_MS)?.emcPct
    expect(after).toBeCloseTo(14, 1)
    expect(airOfHour(material, SHOP, madeAt + 20 * HOUR_MS)?.emcPct).toBeCloseTo(13, 9)
    const beyond = airOfHour(material, SHOP, madeAt + 80 * HOUR_MS)?.emcPct
    expect(beyond).toBeCloseTo((20 * 13 + 4 * 8.7) / 24, 6)
  })

  it('is less sure the longer the stay ahead', () => {
    const doubt = (stayMinutes: number) =>
      carryCheckInput(damp, { ...asked, pieceId: BOX, startsAt: now, stayMinutes })?.airDoubtPct ?? NaN
    expect(doubt(24 * 60)).toBeGreaterThan(doubt(60))
    const gone = { now: now.getTime(), startsAt: now.getTime() - 5 * HOUR_MS, stayMs: 4 * HOUR_MS }
    expect(aheadDoubtPct({ ...gone, forecast: forecastWith(15), record: [] })).toBe(0)
  })
})
