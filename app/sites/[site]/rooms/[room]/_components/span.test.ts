import { describe, expect, it } from 'vitest'
import { seriesQueryOf, spanOf } from './span'

describe("the stretch of a room's chart", () => {
  it('comes from the address, and is a day when the address says nothing that we know', () => {
    expect(spanOf('month', 'maker')).toBe('month')
    expect(spanOf('century', 'maker')).toBe('day')
    expect(spanOf(undefined, 'hand')).toBe('day')
  })

  it('never shows an onlooker single hours', () => {
    expect(spanOf('day', 'onlooker')).toBe('month')
  })

  it('ends now', () => {
    const now = new Date('2026-03-05T13:10:00Z')
    expect(seriesQueryOf('day', now)).toMatchObject({
      from: '2026-03-04T13:10:00.000Z',
      to: now.toISOString(),
    })
  })
})
