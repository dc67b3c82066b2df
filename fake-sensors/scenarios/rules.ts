import type { Air, ClimateRoom } from '../climates/rooms'
import { normalDay } from './normal-day'
import type { Scenario } from './scenario'

/** What makes one rule be told; the rest of the place goes on as on any day. All figures are inventions. */
type Course = Pick<Scenario, 'airOf' | 'batteryOf' | 'spoiled'>

const day = 24

/** A room that has been damper, or drier, for some days before the start, by percent RH; comes on over half a day. */
function shifted(rooms: readonly ClimateRoom[], fromDays: number, byPct: number): Course {
  return {
    airOf: (room, hours, air) => {
      if (!rooms.includes(room)) return air
      const share = Math.min(1, Math.max(0, (hours + fromDays * day) / 12))
      return { ...air, humidityPct: within(air.humidityPct + share * byPct) }
    },
  }
}

const within = (humidityPct: number): number => Math.min(97, Math.max(8, humidityPct))

/** The air of a room as told, from some hours after the start on; comes on within the hour. */
function becomes(rooms: readonly ClimateRoom[], fromHours: number, to: Partial<Air>): Course {
  return {
    airOf: (room, hours, air) => {
      if (!rooms.includes(room)) return air
      const share = Math.min(1, Math.max(0, hours - fromHours))
      const mix = (is: number, told: number | undefined) =>
        told === undefined ? is : is + share * (told - is)
      return {
        temperatureC: mix(air.temperatureC, to.temperatureC),
        humidityPct: mix(air.humidityPct, to.humidityPct),
      }
    },
  }
}

const courses: Readonly<Record<string, Course>> = {
  'keep-room-band': shifted(['cupboard'], 5, 22),
  'damper-than-normal': shifted(['study'], 4, 25),
  'mould-risk': shifted(['study'], 45, 38),
  'too-dry': shifted(['cupboard'], 6, -35),
  'cold-iron': becomes(['shop'], -14, { humidityPct: 96 }),
  'shop-unfit': becomes(['shop'], -2 * day, { humidityPct: 92 }),
  'good-hours': shifted(['shop'], 60, -45),
  'verdict-worse': {
    // Somebody leaves the door open in the rain.
    airOf: (room, hours, air) =>
      room === 'shop' && hours > 0.05
        ? {
            ...air,
            humidityPct: air.humidityPct + (97 - air.humidityPct) * Math.min(1, (hours - 0.05) / 0.15),
          }
        : air,
  },
  'battery-low': { batteryOf: (model) => (model === 'shop-bench' ? 12 : undefined) },
  'refused-messages': {
    spoiled: (model, hours) =>
      model === 'shop-door' && hours >= 0 ? '{"temperatureC":"21,5","humidityPct":71.2}' : undefined,
  },
  'tub-out': {
    // Carried out into the yard: it loses its warmth within the half hour.
    airOf: (room, hours, air) =>
      room === 'tub' && hours > 0.05
        ? { ...air, temperatureC: air.temperatureC - 7 * Math.min(1, (hours - 0.05) / 0.25) }
        : air,
  },
}

/** One scenario for each rule; those that a carry, a plan or the clock alone make happen have a day like any other. */
export const ruleScenario = (name: string): Scenario => ({ ...normalDay, ...courses[name], name })
