import { describe, expect, it } from 'vitest'
import { FILM_M_PER_S } from '@/lib/follow/finish'
import { agreements, emcByTemperature, spreadOf } from './agreement'
import { filmEffectiveness, mostOverPromisedPct } from './film-effectiveness'
import { EFFECTIVENESS_TABLE } from './published/effectiveness-table'

const found = (id: string) => {
  const one = agreements().find((agreement) => agreement.id === id)
  if (one === undefined) throw new Error(`no comparison ${id}`)
  return one
}

describe('the program beside the tables', () => {
  it('takes the largest without its sign, and the root of the mean square', () => {
    expect(spreadOf([3, -4])).toEqual({ count: 2, largest: 4, rms: Math.sqrt(12.5) })
    expect(spreadOf([])).toEqual({ count: 0, largest: 0, rms: 0 })
  })

  // Each limit is the tolerance at which the same table is tested beside its function.
  it.each([
    ['emc', 228, 0.06],
    ['saturation', 5, 0.0003],
    ['ratio', 7, 0.01],
    ['movement', 62, 1.5e-5],
    ['salts', 35, 0.1],
    ['salts-memory', 7, 0.1],
    ['half-time', 1, 0.001],
    ['roots', 36, 1e-5],
    ['steps', 126, 1e-4],
  ] as const)('%s: %d values, none further off than %d', (id, count, limit) => {
    const { count: counted, largest, rms } = found(id)
    expect(counted).toBe(count)
    expect(largest).toBeLessThan(limit)
    expect(largest).toBeGreaterThan(0)
    expect(rms).toBeLessThanOrEqual(largest)
  })

  it('names as printed only what was read or confirmed in print', () => {
    const kinds = Object.fromEntries(agreements().map(({ id, kind }) => [id, kind]))
    expect(kinds).toMatchObject({
      emc: 'printed',
      'salts-memory': 'recalled',
      steps: 'derived',
      roots: 'derived',
    })
  })

  it('parts the EMC cells by temperature without losing one', () => {
    const rows = emcByTemperature()
    expect(rows).toHaveLength(18)
    expect(rows.reduce((sum, row) => sum + row.cells.length, 0)).toBe(found('emc').count)
    expect(Math.max(...rows.map((row) => row.largest))).toBe(found('emc').largest)
    expect(
      rows.find((row) => row.temperatureF === 70)?.cells.find((cell) => cell.humidityPct === 50),
    ).toMatchObject({
      printedPct: 9.2,
    })
  })
})

describe('a film', () => {
  it.each(EFFECTIVENESS_TABLE.filter((row) => row.film !== undefined))(
    '$finish, $coats coats: its figure gives back the first day, and promises no less than the print after',
    ({ film, afterDaysPct }) => {
      if (film === undefined) throw new Error('a row without a film')
      expect(Math.abs(100 * filmEffectiveness(FILM_M_PER_S[film], 1) - afterDaysPct[0])).toBeLessThan(1.5)
      expect(100 * filmEffectiveness(FILM_M_PER_S[film], 14)).toBeGreaterThan(afterDaysPct[2] - 1)
    },
  )

  it('keeps out less the longer it lasts, without a jump where the sum changes', () => {
    let before = filmEffectiveness(2e-8, 0.01)
    for (let days = 0.0101; days < 400; days *= 1.01) {
      const share = filmEffectiveness(2e-8, days)
      expect(share).toBeLessThan(before)
      expect(before - share).toBeLessThan(0.005)
      before = share
    }
  })

  it('is not trusted whole, for it promises more the longer it lasts', () => {
    expect(mostOverPromisedPct(1)).toBeLessThan(1.5)
    expect(mostOverPromisedPct(7)).toBeGreaterThan(20)
    expect(mostOverPromisedPct(14)).toBeGreaterThan(mostOverPromisedPct(7))
  })

  it('names the input that is wrong', () => {
    expect(() => filmEffectiveness(0, 1)).toThrow('filmMPerS')
    expect(() => filmEffectiveness(1e-8, Number.NaN)).toThrow('days')
  })
})
