import { describe, expect, it } from 'vitest'
import { CAUSES, DRAWS, drawsOf, normalBelow, normalQuantile } from './draws'

const mean = (values: Float64Array) => values.reduce((sum, value) => sum + value, 0) / values.length

describe('draws', () => {
  it('are standard normal for every cause, and hardly related', () => {
    const draws = drawsOf()
    for (const cause of CAUSES) {
      expect(draws[cause]).toHaveLength(DRAWS)
      expect(Math.abs(mean(draws[cause]))).toBeLessThan(1e-5)
      expect(Math.abs(mean(draws[cause].map((value) => value * value)) - 1)).toBeLessThan(0.02)
      for (const other of CAUSES) {
        if (other === cause) continue
        const together = mean(draws[cause].map((value, n) => value * (draws[other][n] ?? 0)))
        expect(Math.abs(together), `${cause} with ${other}`).toBeLessThan(0.25)
      }
    }
  })

  it('are the same for the same seed, others for another', () => {
    expect([...drawsOf(5).diffusion]).toEqual([...drawsOf(5).diffusion])
    expect([...drawsOf(5).diffusion]).not.toEqual([...drawsOf(6).diffusion])
  })

  // Quantiles of the standard normal distribution: NIST/SEMATECH e-Handbook of Statistical Methods, table 1.3.6.7.1.
  it.each([
    [0.5, 0],
    [0.9, 1.2816],
    [0.95, 1.6449],
    [0.975, 1.96],
    [0.1, -1.2816],
  ])('the %d quantile is %d', (probability, value) => {
    expect(normalQuantile(probability)).toBeCloseTo(value, 3)
    expect(normalBelow(value)).toBeCloseTo(probability, 3)
  })
})
