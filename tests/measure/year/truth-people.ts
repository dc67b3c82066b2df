import { chanceOf } from './chance'

/** What people do to the air: heating, cooking, working days. Clock times are those of the site's sun; all invented. */

const DAY_MS = 86_400_000
const dayOf = (atMs: number): number => Math.floor(atMs / DAY_MS)
const hourOf = (atMs: number): number => (atMs % DAY_MS) / 3_600_000
/** 1970 began on a Thursday, so day 3 was a Sunday. */
const isSunday = (day: number): boolean => (day - 3) % 7 === 0

export function wantedInHouseC(atMs: number): number {
  const hour = hourOf(atMs)
  if (hour >= 6.5 && hour < 9) return 20
  if (hour >= 16.5 && hour < 22) return 20.5
  return hour >= 9 && hour < 16.5 ? 18.5 : 16.5
}

const meals = [
  { name: 'breakfast', atH: 7.3, often: 0.85, paPerH: 260 },
  { name: 'dinner', atH: 18.6, often: 0.95, paPerH: 700 },
] as const

/** Water that a kitchen adds to the house's air, Pa an hour: half an hour of it at a meal. */
export function cookingPaPerH(atMs: number, seed: number): number {
  const hour = hourOf(atMs)
  let sum = 0
  for (const meal of meals) {
    if (hour < meal.atH - 1 || hour > meal.atH + 2) continue
    const chance = chanceOf(seed + 7919 * dayOf(atMs), meal.name)
    const from = meal.atH + chance.between(-0.6, 0.8)
    if (chance.happens(meal.often) && hour >= from && hour < from + 0.5) sum += meal.paPerH
  }
  return sum
}

export interface Heating {
  /** What the heat is set to; null: off. */
  wantedC: number | null
  isAtWork: boolean
}

/** The maker's day in the shop: most working days, and the heat lit on those that are cold. */
export function heatingOf(seed: number): (atMs: number, outC: number) => Heating {
  let day = -1
  let fromH = 0
  let untilH = 0
  let wantedC = 15
  let isWorkDay = false
  let lightsBelowC = 12
  return (atMs, outC) => {
    if (dayOf(atMs) !== day) {
      day = dayOf(atMs)
      const chance = chanceOf(seed + 104_729 * day, 'shop day')
      isWorkDay = !isSunday(day) && chance.happens(0.8)
      fromH = chance.between(7.5, 9.5)
      untilH = chance.between(15.5, 18)
      wantedC = chance.between(13.5, 17)
      lightsBelowC = chance.between(9, 14)
    }
    const hour = hourOf(atMs)
    const isAtWork = isWorkDay && hour >= fromH && hour < untilH
    return { isAtWork, wantedC: isAtWork && outC < lightsBelowC ? wantedC : null }
  }
}
