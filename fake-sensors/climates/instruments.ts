import { createNoise, hashed } from './noise'
import type { Weather } from './outdoor'
import { type Air, createRooms, type ClimateRoom } from './rooms'

export interface Instrument {
  room: ClimateRoom
  /** What this one reads too much, in K and in percent RH: no two sensors of a shelf agree. */
  offsetC: number
  offsetPct: number
}

/** The nine simulated instruments, by model name. Offsets are inside what data sheets allow (±0.3 K, ±3 % RH). */
export const instruments = {
  'cupboard-upper': { room: 'cupboard', offsetC: 0.15, offsetPct: -0.6 },
  'cupboard-lower': { room: 'cupboard', offsetC: -0.35, offsetPct: 1.1 },
  study: { room: 'study', offsetC: 0, offsetPct: 0.4 },
  kitchen: { room: 'kitchen', offsetC: 0.3, offsetPct: -0.9 },
  'shop-bench': { room: 'shop', offsetC: 0.1, offsetPct: 0.3 },
  'shop-door': { room: 'shop', offsetC: -0.5, offsetPct: 1.6 },
  'shop-shelf': { room: 'shop', offsetC: 0.4, offsetPct: -1.2 },
  store: { room: 'store', offsetC: 0, offsetPct: -0.2 },
  tub: { room: 'tub', offsetC: 0.1, offsetPct: 0.2 },
} as const satisfies Record<string, Instrument>

export type InstrumentName = keyof typeof instruments
export const instrumentNames = Object.keys(instruments) as InstrumentName[]
export const isInstrumentName = (name: string): name is InstrumentName => Object.hasOwn(instruments, name)

export interface Measured {
  temperatureC: number
  humidityPct: number
}

export type Measure = (name: InstrumentName, atMs: number) => Measured

/** Draughts and people: how far the air at the instrument wanders within minutes, and its last digit. */
const WANDER_MS = 11 * 60_000
const WANDER_C = 0.08
const WANDER_PCT = 0.35
const LAST_DIGIT_C = 0.03
const LAST_DIGIT_PCT = 0.12

const rounded = (value: number, steps: number): number => Math.round(value * steps) / steps

/**
 * What an instrument shows at an instant, with its own offset and noise, to 0.01 °C and 0.1 % RH.
 * @param seed any integer; the same seed gives the same place
 * @param weather what a scenario adds to the weather
 * @param change what a scenario makes of the air of a room
 */
export function createInstruments(
  seed: number,
  weather?: Weather,
  change: (room: ClimateRoom, atMs: number, air: Air) => Air = (_room, _atMs, air) => air,
): Measure {
  const air = createRooms(seed, weather)
  const noise = createNoise(seed)
  return (name, atMs) => {
    const { room, offsetC, offsetPct } = instruments[name]
    const { temperatureC, humidityPct } = change(room, atMs, air(room, atMs))
    const own = 100 + 10 * instrumentNames.indexOf(name)
    const second = Math.floor(atMs / 1000)
    // A closed tub has no draught and no visitors.
    const stir = room === 'tub' ? 0.3 : 1
    const wander = (channel: number) => stir * noise(channel, atMs / WANDER_MS)
    const digit = (channel: number) => 2 * hashed(seed, channel, second) - 1
    const shownPct = humidityPct + offsetPct + WANDER_PCT * wander(own) + LAST_DIGIT_PCT * digit(own + 1)
    return {
      temperatureC: rounded(
        temperatureC + offsetC + WANDER_C * wander(own + 2) + LAST_DIGIT_C * digit(own + 3),
        100,
      ),
      humidityPct: rounded(Math.min(99, Math.max(5, shownPct)), 10),
    }
  }
}
