import { describe, expect, it } from 'vitest'
import { firstAnswer } from './first-answer'
import { type JointFacts, UNTOLD_JOINT } from './joint-defaults'

const box: JointFacts = {
  ...UNTOLD_JOINT,
  wood: 'fraxinus-excelsior',
  jointDiameterMm: 62,
  fitGrade: 'easy',
}
const house = { temperatureC: 20.6, humidityPct: 45 }
const shop = { temperatureC: 8, humidityPct: 71 }

describe('the first answer about a new piece', () => {
  it('gives an easy box a short while in a damp shop', () => {
    const answer = firstAnswer(house, shop, box)
    expect(answer).toMatchObject({ kind: 'keep-short' })
    if (answer?.kind === 'keep-short') expect(answer.minutesEarly).toBeLessThan(answer.minutes)
  })
  it('keeps a wide snug one at home', () => {
    expect(firstAnswer(house, shop, { ...box, jointDiameterMm: 110, fitGrade: 'suction' })?.kind).toBe(
      'leave',
    )
  })
  it('has no fear of the room next door', () => {
    expect(firstAnswer(house, { temperatureC: 20, humidityPct: 46 }, box)).toEqual({ kind: 'keeps' })
  })
  it.each([{ jointDiameterMm: null }, { fitGrade: 'threaded' as const }])('says nothing of %j', (change) => {
    expect(firstAnswer(house, shop, { ...box, ...change })).toBeUndefined()
  })
})
