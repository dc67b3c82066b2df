import { type Chance, chanceOf } from './chance'

/** The air outside of one simulated place: seasons, days, spells, passing fronts. All figures are inventions. */
export interface Outside {
  temperatureC: number
  vapourPa: number
  /** Of the sun on a wall, 0 to 1. */
  sun: number
}

/** Magnus' short form over water: its own code, as nothing here is shared with the product. */
export const fullVapourPa = (temperatureC: number): number =>
  611.2 * Math.exp((17.62 * temperatureC) / (243.12 + temperatureC))

const YEAR_H = 8765.8

/** A value that wanders about 0 and forgets itself over some hours. */
function wanderer(chance: Chance, forgetsOverH: number, spread: number): (stepH: number) => number {
  let value = spread * chance.normal()
  return (stepH) => {
    const keeps = Math.exp(-stepH / forgetsOverH)
    value = value * keeps + spread * Math.sqrt(1 - keeps * keeps) * chance.normal()
    return value
  }
}

/** Air of another origin now and then: it comes within hours, and rain goes before it. */
function fronts(chance: Chance) {
  let nextH = 0
  let aimC = 0
  let wetUntilH = 0
  let massC = 0
  return (hour: number, stepH: number) => {
    if (hour >= nextH) {
      aimC = 2.3 * chance.normal()
      wetUntilH = hour + (chance.happens(0.7) ? chance.between(4, 16) : 0)
      nextH = hour + 20 - 80 * Math.log(1 - chance.even())
    }
    massC += (aimC - massC) * -Math.expm1(-stepH / 7)
    return { massC, isWet: hour < wetUntilH }
  }
}

/**
 * The weather of a place, step by step.
 * @returns a function to be called with each hour in turn (hours since 1 January, local sun time) and the step, h
 */
export function weatherOf(seed: number): (hour: number, stepH: number) => Outside {
  const chance = chanceOf(seed, 'weather')
  const meanC = chance.between(9, 11.5)
  const seasonC = chance.between(5.5, 8)
  const swingC = chance.between(2.5, 4.5)
  const dryK = chance.between(2, 3.2)
  const spell = wanderer(chance, 70, 2.2)
  const squall = wanderer(chance, 9, 0.7)
  const sky = wanderer(chance, 14, 0.8)
  const dampness = wanderer(chance, 30, 1.1)
  const front = fronts(chance)
  return (hour, stepH) => {
    const season = Math.cos((2 * Math.PI * (hour / 24 - 203)) / (YEAR_H / 24))
    const summer = (1 + season) / 2
    const { massC, isWet } = front(hour, stepH)
    const cloud = isWet ? 1 : 1 / (1 + Math.exp(-(0.4 + 1.6 * sky(stepH))))
    const ofDay = Math.cos((2 * Math.PI * ((hour % 24) - 14.7)) / 24)
    const dayC = meanC + seasonC * season + massC + spell(stepH) + squall(stepH)
    const temperatureC = dayC + swingC * (0.35 + 0.65 * summer) * (1.15 - cloud) * ofDay
    const apartK = Math.max(0.3, (dryK + 2.6 * summer + dampness(stepH)) * (isWet ? 0.5 : 1))
    const vapourPa = Math.min(0.97 * fullVapourPa(temperatureC), fullVapourPa(dayC - apartK))
    return { temperatureC, vapourPa, sun: Math.max(0, ofDay) * (1 - cloud) * (0.3 + 0.7 * summer) }
  }
}
