import { describe, expect, it } from 'vitest'
import { carry, HOUR_MS, hoursUntil, NOW } from '@/tests/support/carry'
import type { AirFrom } from '@/lib/follow/wood-state'
import { forgottenFigures, howBadWords, tonightWords, tryWords } from './forgotten'

const clock = { timeZone: 'Europe/London', now: new Date(NOW) }

/** A box that went out into damp air some hours ago and comes home to the air that it was cut in. */
function forgotten(hoursOut: number, over: Parameters<typeof carry>[1] = {}) {
  const outAt = NOW - hoursOut * HOUR_MS
  const input = carry(
    { startsAt: outAt, history: hoursUntil(outAt, 480, 8.5, 'closed'), stayMinutes: hoursOut * 60 },
    over,
  )
  const out: AirFrom[] = [{ at: outAt, emcPct: 13.6, temperatureC: 8, cover: 'open', isKnown: true }]
  const home: AirFrom[] = [{ at: outAt, emcPct: 8.5, temperatureC: 20, cover: 'closed', isKnown: true }]
  return forgottenFigures(input, out, home)
}
const ms = (at: string | null | undefined): number => Date.parse(at ?? 'never')

describe('a box that was forgotten', () => {
  it('is the worse and the longer to wait for, the longer it was out', () => {
    const [few, night, days] = [2, 14, 60].map((hours) => forgotten(hours))
    expect(few?.usedNow?.middle).toBeLessThan(night?.usedNow?.middle ?? 0)
    expect(night?.usedNow?.middle).toBeLessThan(days?.usedNow?.middle ?? 0)
    expect(ms(night?.tryAt)).toBeLessThanOrEqual(ms(days?.tryAt))
    expect(ms(night?.tryAt)).toBeGreaterThanOrEqual(NOW)
  })

  it('is told with its doubt, and nine in ten are back later than the middle', () => {
    const night = forgotten(14)
    const now = night?.usedNow
    expect(now?.low).toBeLessThan(now?.middle ?? 0)
    expect(now?.high).toBeGreaterThan(now?.middle ?? Infinity)
    expect(night?.usedMost?.middle).toBeGreaterThanOrEqual(now?.middle ?? Infinity)
    expect(ms(night?.tryAtLate) >= ms(night?.tryAt) || night?.tryAtLate === null).toBe(true)
    expect(howBadWords(night, clock)).toMatch(/times what it may lose \(8 in 10 lie between .* times\): /)
  })

  it('may be tried at once where hardly anything is used', () => {
    const loose = forgotten(1, { allowanceMm: 0.8 })
    expect(howBadWords(loose, clock)).toMatch(/about a tenth of what it may lose.*you may feel nothing/)
    expect(tryWords(loose, clock)).toMatch(/^It can be tried tonight/)
  })

  it('is waited for two days where nothing can be worked out, and says so', () => {
    expect(forgotten(14, { fitGrade: 'threaded', allowanceMm: null })).toBeUndefined()
    expect(howBadWords(undefined, clock)).toMatch(/can’t be worked out/)
    expect(tryWords(undefined, clock)).toMatch(
      /about two days\. Try it cold, at each of four quarters, with no force/,
    )
  })

  it('is to be brought in first while it is out, and never to be warmed or forced', () => {
    expect(tonightWords(true)[0]).toMatch(/^Bring it in now/)
    expect(tonightWords(false).join(' ')).not.toMatch(/Bring it in/)
    for (const isOut of [true, false]) expect(tonightWords(isOut).join(' ')).toMatch(/No heat.*Never force/)
  })
})
