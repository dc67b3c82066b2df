import { chanceOf } from './chance'
import { fullVapourPa, type Outside, weatherOf } from './truth-weather'
import { cookingPaPerH, heatingOf, wantedInHouseC } from './truth-people'

/**
 * The true air of a simulated site, by the five minutes: weather, a heated house with a cupboard, an unheated shop whose
 * walls and timber hold water in layers. Shares no code and no figures with the product or with its simulated sensors.
 */

export const AIR_STEP_MS = 300_000
const STEP_H = AIR_STEP_MS / 3_600_000
export const trueRooms = ['outdoor', 'cupboard', 'shop'] as const
export type TrueRoom = (typeof trueRooms)[number]

export interface TrueAir {
  readonly temperatureC: number
  readonly humidityPct: number
}

export interface TruthAir {
  readonly at: (room: TrueRoom, atMs: number) => TrueAir
  /** Whether the shop's heat is on, or was in the last three hours. */
  readonly isWarmed: (atMs: number) => boolean
}

/** Layers of what holds water in a room, from its surface inwards: how quickly each follows the one before, 1/h. */
const LAYER_RATES = [0.5, 0.12, 0.03, 0.008, 0.002, 0.0007] as const

/** A room's water: its air, and layers of wall, timber or cloth behind it, each with its own RH as a fraction. */
function moistRoom(startHumidity: number, surfacePerH: number) {
  const layers = LAYER_RATES.map(() => startHumidity)
  let vapourPa: number | undefined
  return (temperatureC: number, changesPerH: number, comesInPa: number, sourcePaPerH: number): number => {
    const full = fullVapourPa(temperatureC)
    const surface = layers[0] ?? startHumidity
    const before = vapourPa ?? startHumidity * full
    // Implicit in the air, which is quick; the layers are slow enough to go by steps.
    const gain = changesPerH * comesInPa + surfacePerH * surface * full + sourcePaPerH
    const now = (before + STEP_H * gain) / (1 + STEP_H * (changesPerH + surfacePerH))
    vapourPa = Math.min(now, 0.99 * full)
    const humidity = vapourPa / full
    LAYER_RATES.forEach((rate, n) => {
      const outer = n === 0 ? humidity : (layers[n - 1] ?? humidity)
      const own = layers[n] ?? humidity
      const inner = layers[n + 1] ?? own
      // A layer behind is thicker: it draws less of the one before than that gives to it.
      layers[n] = own + STEP_H * rate * (outer - own + 0.4 * (inner - own))
    })
    return vapourPa
  }
}

interface Warmth {
  air: number
  fabric: number
}

function steppedHouse(house: Warmth, out: Outside, wantedC: number): void {
  const heat = Math.min(4, Math.max(0, (wantedC - house.air) / 0.4))
  const gains = 0.35 + 0.9 * out.sun
  house.air +=
    STEP_H * ((house.fabric - house.air) * 0.8 + (out.temperatureC - house.air) * 0.06 + heat + gains * 0.4)
  house.fabric +=
    STEP_H * ((house.air - house.fabric) * 0.08 + (out.temperatureC - house.fabric) * 0.012 + gains * 0.06)
}

function steppedShop(shop: Warmth, out: Outside, wantedC: number | null, isAtWork: boolean): void {
  const heat = wantedC === null ? 0 : Math.min(9, Math.max(0, (wantedC - shop.air) / 0.3))
  const leaks = isAtWork ? 0.45 : 0.25
  shop.air +=
    STEP_H * ((shop.fabric - shop.air) * 1.2 + (out.temperatureC - shop.air) * leaks + heat + 0.6 * out.sun)
  shop.fabric +=
    STEP_H *
    ((shop.air - shop.fabric) * 0.06 + (out.temperatureC + 1.2 - shop.fabric) * 0.03 + 0.25 * out.sun)
}

/**
 * The air of every room over a span.
 * @param seed any integer: climate, weather, buildings and habits follow from it
 * @param fromMs on a whole hour; the place has lived for 60 days by then, so that its walls are of its climate
 */
export function truthAir(seed: number, fromMs: number, untilMs: number): TruthAir {
  const chance = chanceOf(seed, 'buildings')
  const startMs = fromMs - 60 * 86_400_000
  const steps = Math.ceil((untilMs - startMs) / AIR_STEP_MS) + 1
  const yearMs = Date.UTC(new Date(startMs).getUTCFullYear(), 0, 1)
  const weather = weatherOf(seed)
  const heating = heatingOf(seed)
  const house: Warmth = { air: 17, fabric: 17 }
  const shop: Warmth = { air: 7, fabric: 7 }
  let cupboardC = 18
  const houseAir = moistRoom(0.5, 2)
  const cupboardAir = moistRoom(0.5, 2)
  const shopAir = moistRoom(0.78, chance.between(2.5, 4.5))
  const shopChanges = chance.between(0.4, 0.9)
  const dampPaPerH = chance.between(25, 60)
  const livingPaPerH = chance.between(60, 130)
  const columns = Object.fromEntries(
    trueRooms.map((room) => [room, { c: new Float32Array(steps), pct: new Float32Array(steps) }]),
  )
  const warmed = new Uint8Array(steps)
  const keep = (room: TrueRoom, n: number, temperatureC: number, vapourPa: number): void => {
    const column = columns[room]
    if (column === undefined) return
    column.c[n] = temperatureC
    column.pct[n] = (100 * vapourPa) / fullVapourPa(temperatureC)
  }
  let lastWarmedMs = -Infinity
  for (let n = 0; n < steps; n += 1) {
    const atMs = startMs + n * AIR_STEP_MS
    const out = weather((atMs - yearMs) / 3_600_000, STEP_H)
    const { wantedC, isAtWork } = heating(atMs, out.temperatureC)
    steppedHouse(house, out, wantedInHouseC(atMs))
    steppedShop(shop, out, wantedC, isAtWork)
    cupboardC += STEP_H * 0.2 * (house.air + 0.8 - cupboardC)
    const airing = out.temperatureC > 16 ? 0.9 : 0.5
    const housePa = houseAir(house.air, airing, out.vapourPa, livingPaPerH + cookingPaPerH(atMs, seed))
    keep('outdoor', n, out.temperatureC, out.vapourPa)
    keep('cupboard', n, cupboardC, cupboardAir(cupboardC, 0.5, housePa, 0))
    const changes = shopChanges * (isAtWork ? 1.8 : 1)
    const wetsPaPerH = dampPaPerH + (isAtWork ? 30 : 0)
    keep('shop', n, shop.air, shopAir(shop.air, changes, out.vapourPa, wetsPaPerH))
    if (wantedC !== null) lastWarmedMs = atMs
    warmed[n] = atMs - lastWarmedMs <= 3 * 3_600_000 ? 1 : 0
  }
  const placeOf = (atMs: number): number =>
    Math.min(steps - 1, Math.max(0, Math.round((atMs - startMs) / AIR_STEP_MS)))
  return {
    at: (room, atMs) => {
      const n = placeOf(atMs)
      return { temperatureC: columns[room]?.c[n] ?? 0, humidityPct: columns[room]?.pct[n] ?? 0 }
    },
    isWarmed: (atMs) => warmed[placeOf(atMs)] === 1,
  }
}
