import { DAY_MS, HOUR_MS } from './outdoor'

/** A chance from 0 to 1 that belongs to the day of an instant and to a purpose. */
export type DayChance = (atMs: number, channel: number) => number

const channel = { stove: 21, stoveAt: 22, breakfast: 31, noon: 32, supper: 33 }

const dayStartMs = (atMs: number): number => Math.floor(atMs / DAY_MS) * DAY_MS

/** 1970 began on a Thursday, so day 3 was the first Sunday. */
const isSunday = (atMs: number): boolean => (Math.floor(atMs / DAY_MS) - 3) % 7 === 0

/** The stove is lit on five of six working days: from about eight until about five. */
const isLit = (atMs: number, chance: DayChance): boolean =>
  !isSunday(atMs) && chance(atMs, channel.stove) < 0.83

const WARMING_H = 1.3
const COOLING_H = 2.8

/** The share of its full effect that the shop's stove has at an instant: 0 to 1, rising and falling like a warm body. */
export function stoveShare(atMs: number, chance: DayChance): number {
  const today = dayStartMs(atMs)
  return ofDay(today) + ofDay(today - DAY_MS)

  function ofDay(dayMs: number): number {
    if (!isLit(dayMs, chance)) return 0
    const litAtH = 7.7 + 1.2 * chance(dayMs, channel.stoveAt)
    const outAtH = 16.2 + 1.4 * chance(dayMs, channel.stoveAt)
    const hour = (atMs - dayMs) / HOUR_MS
    if (hour <= litAtH) return 0
    if (hour <= outAtH) return 1 - Math.exp(-(hour - litAtH) / WARMING_H)
    return (1 - Math.exp(-(outAtH - litAtH) / WARMING_H)) * Math.exp(-(hour - outAtH) / COOLING_H)
  }
}

const meals = [
  { channel: channel.breakfast, atH: 7.4, mostPa: 160, often: 0.9 },
  { channel: channel.noon, atH: 12.6, mostPa: 140, often: 0.55 },
  { channel: channel.supper, atH: 18.4, mostPa: 420, often: 0.95 },
] as const
const STEAMING_H = 0.35
const AIRING_H = 1.1

/** Water vapour that cooking adds to the kitchen at an instant, Pa: up in twenty minutes, gone in a few hours. */
export function cookingPa(atMs: number, chance: DayChance): number {
  const today = dayStartMs(atMs)
  let sum = 0
  for (const dayMs of [today, today - DAY_MS])
    for (const meal of meals) {
      const luck = chance(dayMs, meal.channel)
      const hours = (atMs - dayMs) / HOUR_MS - meal.atH - 0.8 * (luck - 0.5)
      if (luck > meal.often || hours <= 0) continue
      sum +=
        meal.mostPa * (0.5 + luck / 2) * (Math.exp(-hours / AIRING_H) - Math.exp(-hours / STEAMING_H)) * 1.9
    }
  return sum
}
