import { describe, expect, it } from 'vitest'
import { type JointFacts, UNTOLD_JOINT } from './joint-defaults'
import { steadyCarry } from './steady-carry'

/** Its hollow lid, of the ring's own wall, keeps step with it. */
const ash62: JointFacts = {
  ...UNTOLD_JOINT,
  wood: 'fraxinus-excelsior',
  jointDiameterMm: 62,
  lidForm: 'hollow',
  fitGrade: 'easy',
}
const house = { temperatureC: 20.6, humidityPct: 45 }
const shop = { temperatureC: 8, humidityPct: 71 }

function carry(from = house, to = shop) {
  const made = steadyCarry(from, to, ash62)
  if (made === undefined) throw new Error('ash with a joint can be worked out')
  return made
}

describe('a carry between two airs that hold still', () => {
  it('hangs both rooms where the equation of the Wood Handbook puts them', () => {
    // Wood Handbook (2010), eq. 4-5: 20.6 °C and 45 % RH 8.47, 8 °C and 71 % RH 13.72 % MC.
    expect(carry().houseEmcPct).toBeCloseTo(8.47, 2)
    expect(carry().shopEmcPct).toBeCloseTo(13.72, 2)
  })

  it('tells the same minutes both ways round', () => {
    const { mcAfterPct, minutesTo } = carry()
    for (const minutes of [10, 90, 600]) expect(minutesTo(mcAfterPct(minutes))).toBeCloseTo(minutes, 0)
  })

  it('is at the end of its allowance when the middle time out says so', () => {
    const { timeOut, mcAfterPct, highMcPct } = carry()
    if (!timeOut.binds) throw new Error('it binds in a shop five points damper')
    expect(mcAfterPct(timeOut.minutes)).toBeCloseTo(highMcPct, 2)
    expect(timeOut.minutesEarly).toBeLessThan(timeOut.minutes)
  })

  it('counts drying like swelling', () => {
    const dry = carry(shop, house)
    if (!dry.timeOut.binds) throw new Error('it goes loose at a quarter turn just as surely')
    expect(dry.mcAfterPct(60)).toBeLessThan(dry.houseEmcPct)
    expect(dry.mcAfterPct(dry.timeOut.minutes)).toBeCloseTo(dry.lowMcPct, 2)
  })

  it('never gets to where the air would not bring it', () => {
    const { minutesTo, shopEmcPct } = carry()
    expect(minutesTo(shopEmcPct + 1)).toBeUndefined()
  })

  it('stays put where both airs are one', () => {
    const still = carry(house, house)
    expect(still.timeOut.binds).toBe(false)
    expect(still.mcAfterPct(1000)).toBeCloseTo(still.houseEmcPct, 10)
    expect(still.minutesTo(still.houseEmcPct)).toBe(0)
  })

  it('has nothing to say of a threaded lid', () => {
    expect(steadyCarry(house, shop, { ...ash62, fitGrade: 'threaded' })).toBeUndefined()
  })
})
