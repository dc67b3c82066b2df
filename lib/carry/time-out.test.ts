import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { woodMovement } from '@/lib/wood/movement-class'
import { comingHours, type AirRecord } from './forecast'
import { SPECIES_MOVEMENT_FACTOR, TOLD_ALLOWANCE_FACTOR } from '@/lib/doubt/causes'
import { logSpreadNineInTen } from '@/lib/doubt/spread'
import { partFilter } from '@/lib/follow/part'
import type { PlaceCover } from '@/lib/pieces/piece'
import { timeOutInSteadyAir, type SteadyAirInput } from './time-out'

const HOUR_MS = 3_600_000
const NOW = Date.UTC(2026, 2, 5, 13, 10)

interface Asked {
  wallMm: number
  densityKgM3: number
  cover: PlaceCover
  lossMmPerPct: number
  allowanceMm: number
  fromMcPct: number
  toEmcPct: number
  temperatureC: number
}

function houseToShop(wood: string, diameterMm: number, wallMm: number, allowanceMm: number): Asked {
  const { differencePerPct, densityKgM3 } = woodMovement(wood)
  return {
    wallMm,
    densityKgM3,
    cover: 'open',
    lossMmPerPct: diameterMm * differencePerPct,
    allowanceMm,
    fromMcPct: 8.5,
    toEmcPct: 13.6,
    temperatureC: 10,
  }
}

/** The ring alone: its lid is taken to keep step. */
const inputOf = ({ wallMm, densityKgM3, lossMmPerPct, ...air }: Asked): SteadyAirInput => ({
  ...air,
  filter: {
    ring: partFilter({ kind: 'ring', wallMm, lengthMm: 6, grain: 'end-grain' }, densityKgM3),
    lid: null,
  },
  loss: { swellMmPerPct: 2 * lossMmPerPct, skewMmPerPct: lossMmPerPct / 2, isRingInside: true },
  spreads: {
    movementLog: logSpreadNineInTen(SPECIES_MOVEMENT_FACTOR),
    allowanceLog: logSpreadNineInTen(TOLD_ALLOWANCE_FACTOR),
    airPct: 0,
    startPct: 0,
  },
})
const timeOutOf = (asked: Asked) => timeOutInSteadyAir(inputOf(asked))

function minutesOrThrow(asked: Asked): number {
  const timeOut = timeOutOf(asked)
  if (!timeOut.binds) throw new Error('it never uses up its allowance there')
  return timeOut.minutes
}

describe('time out, house 8.5 to shop 13.6 % EMC at 10 °C (derived, told to two figures)', () => {
  it.each([
    ['fraxinus-excelsior', 62, 4, 0.15, 4.6, 7.6],
    ['fraxinus-excelsior', 88, 3, 0.12, 1.2, 2.2],
    ['fagus-sylvatica', 60, 4, 0.15, 1.4, 2.3],
  ] as const)(
    '%s, %d mm, %d mm wall, %d mm: about %d h open, %d h with the lid on',
    (wood, d, w, a, open, lidOn) => {
      const input = houseToShop(wood, d, w, a)
      expect(Math.abs(minutesOrThrow(input) / 60 / open - 1)).toBeLessThan(0.08)
      expect(Math.abs(minutesOrThrow({ ...input, cover: 'lid-on' }) / 60 / lidOn - 1)).toBeLessThan(0.08)
    },
  )

  it('African blackwood, 50 mm, 4 mm wall, 0.10 mm: days', () => {
    expect(minutesOrThrow(houseToShop('dalbergia-melanoxylon', 50, 4, 0.1))).toBeGreaterThan(24 * 60)
  })

  it('the early edge is about 0.45 of the middle, the late one about 2.2 of it', () => {
    const timeOut = timeOutOf(houseToShop('fraxinus-excelsior', 62, 4, 0.15))
    if (!timeOut.binds) throw new Error('it does bind')
    expect(Math.abs(timeOut.minutesEarly / timeOut.minutes - 0.45)).toBeLessThan(0.04)
    expect(Math.abs((timeOut.minutesLate ?? NaN) / timeOut.minutes - 2.2)).toBeLessThan(0.5)
  })
})

describe('time out, properties', () => {
  const wallMm = fc.double({ min: 1, max: 10, noNaN: true })
  const allowanceMm = fc.double({ min: 0.03, max: 0.4, noNaN: true })
  const toEmcPct = fc.double({ min: 3, max: 22, noNaN: true })
  const input = fc
    .record({ wallMm, allowanceMm, toEmcPct, diameterMm: fc.double({ min: 20, max: 120, noNaN: true }) })
    .map((drawn) => ({
      ...houseToShop('fagus-sylvatica', drawn.diameterMm, drawn.wallMm, drawn.allowanceMm),
      toEmcPct: drawn.toEmcPct,
    }))
  const orForever = (asked: Asked): number => {
    const timeOut = timeOutOf(asked)
    return timeOut.binds ? timeOut.minutes : Infinity
  }
  /** Times are found to the second. */
  const secondInMinutes = 1 / 60

  it('is never shorter for a thicker wall, a larger allowance or a closer cover', () => {
    fc.assert(
      fc.property(input, fc.double({ min: 0.02, max: 2, noNaN: true }), (asked, more) => {
        const shortest = orForever(asked) - 2 * secondInMinutes
        expect(orForever({ ...asked, allowanceMm: asked.allowanceMm + more })).toBeGreaterThanOrEqual(
          shortest,
        )
        // Each wall and cover has a ladder of its own, within 0.0065 of the fraction changed: a fifth of a time at most.
        const lidOn = orForever({ ...asked, cover: 'lid-on' })
        expect(orForever({ ...asked, wallMm: asked.wallMm + more })).toBeGreaterThanOrEqual(0.8 * shortest)
        expect(lidOn).toBeGreaterThanOrEqual(0.8 * shortest)
        expect(orForever({ ...asked, cover: 'closed' })).toBeGreaterThanOrEqual(0.8 * lidOn)
      }),
      { numRuns: 25, endOnFailure: true },
    )
  })

  it('binds just when the whole change would use up the allowance', () => {
    fc.assert(
      fc.property(input, (asked) => {
        const whole = (asked.lossMmPerPct * Math.abs(asked.toEmcPct - asked.fromMcPct)) / asked.allowanceMm
        fc.pre(Math.abs(whole - 1) > 1e-3)
        expect(timeOutOf(asked).binds).toBe(whole > 1)
      }),
      { numRuns: 25 },
    )
  })

  it('drying counts as swelling does', () => {
    const damp = houseToShop('fagus-sylvatica', 60, 4, 0.15)
    const dry = { ...damp, fromMcPct: 13.6, toEmcPct: 8.5 }
    const drying = minutesOrThrow(dry)
    // The same change in mm; only the diffusion differs, as the wood starts from damper.
    expect(drying).toBeGreaterThan(0.8 * minutesOrThrow(damp))
    expect(drying).toBeLessThan(1.25 * minutesOrThrow(damp))
  })

  it('names the input that is wrong', () => {
    const asked = houseToShop('fagus-sylvatica', 60, 4, 0.15)
    expect(() => timeOutOf({ ...asked, allowanceMm: NaN })).toThrow(/allowanceMm/)
    expect(() => timeOutOf({ ...asked, toEmcPct: NaN })).toThrow(/toEmcPct/)
    expect(() => timeOutOf({ ...asked, fromMcPct: NaN })).toThrow(/fromMcPct/)
    expect(() => timeOutOf({ ...asked, wallMm: NaN })).toThrow(/Mm/)
    expect(() => timeOutOf({ ...asked, densityKgM3: NaN })).toThrow(/densityKgM3/)
    expect(() => timeOutOf({ ...asked, temperatureC: NaN })).toThrow(/temperatureC/)
  })
})

describe('coming hours without a forecast', () => {
  const dayAt = (at: number): number => 12 + 2 * Math.sin((at / (24 * HOUR_MS)) * 2 * Math.PI)
  const record: AirRecord[] = Array.from({ length: 48 }, (_, n) => {
    const at = Math.floor(NOW / HOUR_MS) * HOUR_MS - (48 - n) * HOUR_MS
    return { at, emcPct: dayAt(at), temperatureC: 8 }
  })
  const atHour = (at: number): number => Math.floor(at / HOUR_MS) * HOUR_MS
  const asked = { now: NOW, startsAt: NOW, hours: 72, record }

  it('begin at the present and are yesterday’s after 6 h', () => {
    const present = { emcPct: dayAt(atHour(NOW)) + 1.2, temperatureC: 9 }
    const hours = comingHours({ ...asked, present })
    expect(hours[0]).toEqual({ at: NOW, emcPct: expect.closeTo(present.emcPct, 9), temperatureC: 9 })
    expect(hours[3]?.emcPct).toBeCloseTo(dayAt(atHour(NOW) + 3 * HOUR_MS) + 0.6, 9)
    expect(hours[6]?.emcPct).toBeCloseTo(dayAt(atHour(NOW) + 6 * HOUR_MS), 9)
    expect(hours[30]?.emcPct).toBeCloseTo(dayAt(atHour(NOW) + 30 * HOUR_MS), 9)
    expect(hours).toHaveLength(72)
  })

  it('of a plan for later need no present difference', () => {
    const present = { emcPct: 20, temperatureC: 9 }
    const startsAt = NOW + 20 * HOUR_MS
    expect(comingHours({ ...asked, present, startsAt })[0]?.emcPct).toBeCloseTo(dayAt(atHour(startsAt)), 9)
  })

  it('hold the present where no day before has that hour', () => {
    const hours = comingHours({ ...asked, record: [], present: { emcPct: 13, temperatureC: 7 } })
    expect(new Set(hours.map((hour) => hour.emcPct))).toEqual(new Set([13]))
    expect(new Set(hours.map((hour) => hour.temperatureC))).toEqual(new Set([7]))
  })

  it('look a day further back for an hour that is missing yesterday', () => {
    const missingAt = atHour(NOW) + 10 * HOUR_MS - 24 * HOUR_MS
    const withGap = record.map((hour) => (hour.at === missingAt ? { ...hour, emcPct: null } : hour))
    const present = { emcPct: dayAt(atHour(NOW)), temperatureC: 8 }
    expect(comingHours({ ...asked, record: withGap, present })[10]?.emcPct).toBeCloseTo(dayAt(missingAt), 9)
  })

  it('are never wetter than saturated nor drier than nothing', () => {
    const present = { emcPct: 30, temperatureC: 8 }
    const damp = record.map((hour) => ({ ...hour, emcPct: 29 }))
    for (const hour of comingHours({ ...asked, record: damp, present: { ...present, emcPct: 30 } })) {
      expect(hour.emcPct).toBeLessThanOrEqual(30)
    }
  })
})
