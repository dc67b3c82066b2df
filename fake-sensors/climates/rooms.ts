import { saturationPressurePa } from '@/lib/air/saturation'
import { atInstant, lagged, remembered, type Hourly } from './lagged'
import { createNoise, hashed, type Noise } from './noise'
import { DAY_MS, HOUR_MS, hourOfDay, outdoorAir, plainWeather, seasonOf, type Weather } from './outdoor'
import { cookingPa, stoveShare } from './people'

/** The rooms of the invented place. All figures in this file are plausible inventions, none is a measurement. */
export const climateRooms = ['cupboard', 'study', 'kitchen', 'shop', 'store', 'tub'] as const
export type ClimateRoom = (typeof climateRooms)[number]

export interface Air {
  temperatureC: number
  humidityPct: number
}

export type RoomAir = (room: ClimateRoom, atMs: number) => Air

const between = (value: number, min: number, max: number): number => Math.min(max, Math.max(min, value))
const vapourFull = (temperatureC: number): number => saturationPressurePa(temperatureC, 'water')
const ratioPct = (vapourPa: number, temperatureC: number): number =>
  (100 * vapourPa) / vapourFull(temperatureC)

/** The larger of two, without a corner where they cross. */
const smoothMax = (a: number, b: number, cornerK: number): number =>
  Math.max(a, b) + cornerK * Math.log1p(Math.exp(-Math.abs(a - b) / cornerK))

/**
 * How a room holds its humidity: what hangs and stands in it takes up and gives off water, so the air there is a
 * mixture of what comes in now and what the walls and timber remember.
 */
interface Body {
  temperatureC: Hourly
  vapourPa: Hourly
  /** What walls and timber remember, percent RH. */
  heldPct: Hourly
  /** Share of the remembered humidity in the room's own, 0 to 1. */
  holds: number
}

function body(temperatureC: Hourly, vapourPa: Hourly, holds: number, tauHours: number): Body {
  const comesIn: Hourly = remembered((hour) => between(ratioPct(vapourPa(hour), temperatureC(hour)), 5, 97))
  return { temperatureC, vapourPa, holds, heldPct: lagged(comesIn, tauHours) }
}

/** The house warms to what the clock asks for; in summer it follows the outdoors from a few degrees above. */
function houseTemperature(outC: Hourly): Hourly {
  const asked: Hourly = (hour) => {
    const ofDay = hour % 24
    return ofDay >= 6 && ofDay < 9
      ? 19.6
      : ofDay >= 16 && ofDay < 22
        ? 20.2
        : ofDay >= 9 && ofDay < 16
          ? 18.6
          : 17.4
  }
  const heated = lagged(asked, 3)
  const floating = lagged(outC, 30)
  return remembered((hour) => smoothMax(heated(hour), floating(hour) + 5.2, 0.7))
}

/** The house's people wet its air more in winter, when the windows are shut. */
function houseVapour(noise: Noise, outC: Hourly, outPa: Hourly): Hourly {
  const entering = lagged(outPa, 5)
  const mild = lagged(outC, 24)
  return remembered((hour) => {
    const shut = between((17 - mild(hour)) / 14, 0, 1)
    return entering(hour) + (20 + 170 * shut) * (1 + 0.25 * noise(11, hour / 31))
  })
}

/**
 * The air of every room at any instant, for one seed: a pure function, so that the history, the reading of this
 * minute and the forecast of a test agree.
 * @param seed any integer
 * @param weather what a scenario adds to the weather
 */
export function createRooms(seed: number, weather: Weather = plainWeather): RoomAir {
  const noise = createNoise(seed)
  const out = (hour: number) => outdoorAir(noise, weather, hour * HOUR_MS)
  const outC = remembered((hour) => out(hour).temperatureC)
  const outPa = remembered((hour) => out(hour).vapourPa)
  const house = houseTemperature(outC)
  const indoors = houseVapour(noise, outC, outPa)
  const shopC = lagged(outC, 16)
  const lagShopPa = lagged(outPa, 10)
  const damp =
    (pa: number): Hourly =>
    (hour) =>
      lagShopPa(hour) + pa
  // Brick and ground keep last summer's warmth for months: in winter they stand further above the air outside.
  const winter: Hourly = (hour) => (1 - seasonOf(hour * HOUR_MS)) / 2

  const bodies: Record<Exclude<ClimateRoom, 'tub'>, Body> = {
    cupboard: body((hour) => lagHouse(hour) + 1.3, indoors, 0.8, 110),
    study: body((hour) => house(hour) + 0.4, indoors, 0.55, 60),
    kitchen: body(
      (hour) => house(hour) + 0.2,
      (hour) => indoors(hour) + 55,
      0.45,
      36,
    ),
    shop: body((hour) => shopC(hour) + 1.8 + 1.3 * winter(hour), damp(52), 0.65, 140),
    store: body((hour) => storeC(hour) + 0.6 + 1.1 * winter(hour), damp(25), 0.7, 200),
  }
  const lagHouse = lagged(house, 9)
  const storeC = lagged(outC, 7)

  // Offcuts dried in the house live in the tub: its air stands between the house and the shop, weeks behind both.
  const tubPct = lagged(
    (hour) => 0.55 * bodies.cupboard.heldPct(hour) + 0.45 * bodies.shop.heldPct(hour),
    24 * 24,
    24,
  )

  const inRoom = (room: Body, atMs: number, warmerC: number, wetterPa: number): Air => {
    const hours = atMs / HOUR_MS
    const temperatureC = atInstant(room.temperatureC, hours) + warmerC
    const nowPct = ratioPct(atInstant(room.vapourPa, hours) + wetterPa, temperatureC)
    const heldPct = atInstant(room.heldPct, hours)
    return {
      temperatureC,
      humidityPct: between(room.holds * heldPct + (1 - room.holds) * nowPct, 5, 97),
    }
  }

  const dayChance = (atMs: number, channel: number): number =>
    hashed(seed, channel, Math.floor(atMs / DAY_MS))

  return (room, atMs) => {
    const hours = atMs / HOUR_MS
    switch (room) {
      case 'kitchen':
        return inRoom(bodies.kitchen, atMs, 0, cookingPa(atMs, dayChance))
      case 'shop': {
        // The colder it is outside, the harder the stove is driven; on a mild day it stays cold.
        const cold = between((15 - atInstant(shopC, hours)) / 8, 0, 1)
        const share = stoveShare(atMs, dayChance)
        return inRoom(bodies.shop, atMs, share * 6.5 * cold, share * 60 * cold)
      }
      case 'tub':
        return { temperatureC: atInstant(shopC, hours - 3) + 2, humidityPct: atInstant(tubPct, hours) }
      default:
        // A sunny afternoon in the study, a cat's worth of warmth in the cupboard: small swings by the hour.
        return inRoom(bodies[room], atMs, 0.25 * Math.cos((2 * Math.PI * (hourOfDay(atMs) - 16)) / 24), 0)
    }
  }
}
