import { describe, expect, it } from 'vitest'
import { oddWeight } from './odd-weight'

describe('an odd weight', () => {
  it.each([
    [1830, 183, 183],
    [18.3, 183, 183],
    [6.455, 183, 183],
    [5188, 183, 183],
    [300, 183, undefined],
  ])('%f g after %f g is asked about', (grams, lastG, perhapsG) => {
    const odd = oddWeight(grams, lastG)
    expect(odd?.lastG).toBe(lastG)
    if (perhapsG === undefined) expect(odd?.perhapsG).toBeUndefined()
    else expect(odd?.perhapsG).toBeCloseTo(perhapsG, 0)
  })

  it('is none that lies near the last', () => {
    expect(oddWeight(175, 183)).toBeUndefined()
    expect(oddWeight(200, 183)).toBeUndefined()
  })

  it('names an input that is no weight', () => {
    expect(() => oddWeight(NaN, 183)).toThrow(/grams/)
    expect(() => oddWeight(183, 0)).toThrow(/lastG/)
  })
})
