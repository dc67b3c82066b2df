import { describe, expect, it } from 'vitest'
import { emcOfReadingPct } from '@/lib/wood/emc'
import { makeForecast } from './make-forecast'
import type { ForecastInput } from './prepare'
import { HOUR_MS, type HourOfRoom, hourlyRecord } from './record'
import { FORECAST_HOURS, litForecast, roomForecastSchema } from './room-forecast'
import { warmedHours } from './prepare'

const DAY_HOURS = 24
const madeAt = Date.parse('2026-02-10T06:00:00Z')

/** A cold shop with a small swing by day, lit at eight on the days told, for eight hours. */
function shopHour(at: number, isLitOn: (day: number) => boolean): HourOfRoom {
  const day = Math.floor(at / (DAY_HOURS * HOUR_MS))
  const hour = (at / HOUR_MS) % DAY_HOURS
  const wander = Math.sin(at / HOUR_MS / 37) + 0.6 * Math.sin(at / HOUR_MS / 11.3)
  const unlitC = 6 + 0.8 * wander + 0.5 * Math.cos((2 * Math.PI * (hour - 15)) / 24)
  const warmthC =
    !isLitOn(day) || hour < 8
      ? 0
      : hour < 16
        ? 7 * (1 - Math.exp(-(hour - 7) / 1.2))
        : 7 * Math.exp(-(hour - 15) / 2)
  const temperatureC = unlitC + warmthC
  const humidityPct = 72 + 3 * wander - 2.2 * warmthC
  return { at, temperatureC, humidityPct, emcPct: emcOfReadingPct(temperatureC, humidityPct) }
}

function inputWith(isLitOn: (day: number) => boolean, days = 35): ForecastInput {
  const firstAt = madeAt - days * DAY_HOURS * HOUR_MS
  const hours = Array.from({ length: days * DAY_HOURS }, (_, n) => shopHour(firstAt + n * HOUR_MS, isLitOn))
  return {
    madeAt,
    timeZone: 'UTC',
    record: hourlyRecord(hours, firstAt, madeAt),
    outdoors: null,
    lastYear: [],
    isWarmedByHand: true,
  }
}

const never = () => false
const oftenLit = (day: number) => day % 3 !== 0

describe('the forecast of a room', () => {
  it('is of the shape that is stored, with its doubt around it', () => {
    const forecast = makeForecast(inputWith(never), [])
    expect(roomForecastSchema.safeParse(forecast).success).toBe(true)
    forecast?.emcPct.forEach((emcPct, n) => {
      expect(forecast.emcPctLow[n]).toBeLessThanOrEqual(emcPct + 0.2)
      expect(forecast.emcPctHigh[n]).toBeGreaterThanOrEqual(emcPct - 0.2)
    })
    const widthAt = (n: number) => (forecast?.emcPctHigh[n] ?? 0) - (forecast?.emcPctLow[n] ?? 0)
    expect(widthAt(23)).toBeGreaterThan(widthAt(0))
  })

  it('is not made on a few days of record, nor when the last hour is missing', () => {
    expect(makeForecast(inputWith(never, 5), [])).toBeUndefined()
    const { record, ...rest } = inputWith(never)
    const emcPct = record.emcPct.slice()
    emcPct[emcPct.length - 1] = NaN
    expect(makeForecast({ ...rest, record: { ...record, emcPct } }, [])).toBeUndefined()
  })

  it('finds the hours in which a fire was lit, and no others', () => {
    const input = inputWith(oftenLit)
    const warmed = warmedHours(input)
    const { firstAt, length } = input.record
    let lit = 0
    for (let n = 0; n < length; n += 1) {
      const at = firstAt + n * HOUR_MS
      const hour = (at / HOUR_MS) % DAY_HOURS
      const day = Math.floor(at / (DAY_HOURS * HOUR_MS))
      if (oftenLit(day) && hour >= 9 && hour < 17) {
        lit += 1
        expect(warmed.has(at)).toBe(true)
      }
      if (!oftenLit(day)) expect(warmed.has(at)).toBe(false)
    }
    expect(lit).toBeGreaterThan(100)
  })

  it('tells the unlit room, and lit ones apart, from three warmings on', () => {
    const forecast = makeForecast(inputWith(oftenLit), [])
    const noon = 6
    const truth = shopHour(madeAt + noon * HOUR_MS, never)
    expect(forecast?.temperatureC[noon]).toBeCloseTo(truth.temperatureC, -0.5)
    expect(Math.abs((forecast?.emcPct[noon] ?? 0) - truth.emcPct)).toBeLessThan(0.8)
    expect(forecast?.warmed?.litAtTime).toBe('08:00')
    const fell = (forecast?.emcPct[noon] ?? 0) - (forecast?.warmed?.emcPct[noon] ?? 0)
    const didFall = truth.emcPct - shopHour(madeAt + noon * HOUR_MS, () => true).emcPct
    expect(fell).toBeGreaterThan(0.7 * didFall)
    expect(fell).toBeLessThan(1.3 * didFall)
    const twice = (day: number) => [2, 5].includes(Math.floor(madeAt / (DAY_HOURS * HOUR_MS)) - day)
    expect(makeForecast(inputWith(twice), [])?.warmed).toBeNull()
    expect(makeForecast(inputWith(never), [])?.warmed).toBeNull()
  })

  it('takes the lit hours where there are any', () => {
    const forecast = makeForecast(inputWith(oftenLit), [])
    if (forecast === undefined) throw new Error('no forecast')
    const lit = litForecast(forecast)
    expect(lit.emcPct).toHaveLength(FORECAST_HOURS)
    expect(lit.emcPct[6]).toBe(forecast.warmed?.emcPct[6])
    expect(lit.emcPct[1]).toBe(forecast.emcPct[1])
  })

  it('uses a simpler way for the hours in which that has been better', () => {
    const scores = [
      { leadH: 6, n: 100, recordPct: 0.5, sameAsNowPct: 0.3, yesterdayPct: 0.4 },
      { leadH: 12, n: 100, recordPct: 0.5, sameAsNowPct: 0.9, yesterdayPct: 0.4 },
      { leadH: 24, n: 5, recordPct: 0.5, sameAsNowPct: 0.1, yesterdayPct: 0.1 },
    ]
    const forecast = makeForecast(inputWith(never), scores)
    expect(forecast?.method[4]).toBe('same-as-now')
    expect(forecast?.emcPct[4]).toBe(forecast?.sameAsNowPct)
    expect(forecast?.method[9]).toBe('yesterday')
    expect(forecast?.emcPct[9]).toBe(forecast?.yesterdayPct[9])
    expect(forecast?.method[20]).toBe('record')
  })
})
