import { describe, expect, it } from 'vitest'
import { FOLLOWED_BETWEEN_DOUBT_PCT, HOUSE_SENSOR_DOUBT_PCT, sinceCutDoubtPct } from './doubt'

describe('how far followed wood may be out against its cut', () => {
  it('leaves out what the sensor is off by all the time', () => {
    expect(sinceCutDoubtPct(HOUSE_SENSOR_DOUBT_PCT)).toBe(FOLLOWED_BETWEEN_DOUBT_PCT)
  })

  it('keeps nearly all of a cut that is hardly known, and grows with it', () => {
    expect(sinceCutDoubtPct(1.5)).toBeCloseTo(1.47, 2)
    expect(sinceCutDoubtPct(0.7)).toBeGreaterThan(sinceCutDoubtPct(0.5))
    expect(sinceCutDoubtPct(0.7)).toBeLessThan(0.7)
  })

  it('is nothing for a joint that counts from what it is now', () => {
    expect(sinceCutDoubtPct(0)).toBe(0)
  })
})
