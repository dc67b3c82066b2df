import { describe, expect, it } from 'vitest'
import { scaleSteps } from './scale-steps'

describe('steps of a scale to choose from', () => {
  it('stand in the reader’s unit, in grams underneath', () => {
    expect(scaleSteps('metric', null).map(({ words }) => words)).toContain('0.1 g')
    const ounces = scaleSteps('imperial', null)
    expect(ounces.map(({ words }) => words)).toEqual(['0.005 oz', '0.01 oz', '0.05 oz', '0.1 oz', '0.25 oz'])
    expect(ounces[3]?.stepG).toBeCloseTo(2.835, 3)
  })

  it('hold the one in force once, whatever it is', () => {
    expect(scaleSteps('metric', 0.2).map(({ stepG }) => stepG)).toEqual([0.01, 0.1, 0.2, 0.5, 1, 2, 5])
    expect(scaleSteps('metric', 0.1).filter(({ stepG }) => stepG === 0.1)).toHaveLength(1)
    const told = scaleSteps('imperial', 2.8349)
    expect(told.filter(({ words }) => words === '0.1 oz')).toEqual([{ stepG: 2.8349, words: '0.1 oz' }])
  })
})
