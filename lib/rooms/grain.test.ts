import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { seriesGrain, spanMsMax } from './grain'

const hourMs = 3_600_000

describe('the grain of a series', () => {
  it.each([
    [24, 500, { grain: 'raw', stepMs: 180_000 }],
    [48, 500, { grain: 'raw', stepMs: 360_000 }],
    [72, 500, { grain: 'hour' }],
    [24 * 30, 500, { grain: 'day', days: 1 }],
    [24 * 30, 2000, { grain: 'hour' }],
    [24 * 365 * 3, 500, { grain: 'day', days: 3 }],
  ])('%s h in %s points at most', (hours, points, expected) => {
    expect(seriesGrain(hours * hourMs, points)).toEqual(expected)
  })

  it('never asks for more points than may be shown', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: spanMsMax }),
        fc.integer({ min: 2, max: 2000 }),
        (spanMs, points) => {
          const choice = seriesGrain(spanMs, points)
          const stepMs =
            choice.grain === 'raw'
              ? choice.stepMs
              : choice.grain === 'hour'
                ? hourMs
                : choice.days * 24 * hourMs
          expect(spanMs / stepMs).toBeLessThanOrEqual(points)
        },
      ),
    )
  })
})
