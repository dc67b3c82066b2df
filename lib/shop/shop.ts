import { emcPct } from '@/lib/wood/emc'
import { shopCautions, type ShopCaution } from './cautions'
import { holdingHeat, latentHeatKwh, type HoldingHeat } from './heat'
import { heatedHumidityPct, heaterWaterKgPerKwh, type HeaterKind } from './heater'
import { airing, type Airing } from './outdoor-air'
import { assumedSurface, surfaceAnswer, type SurfaceAnswer } from './surface'
import { dryToForEmc, warmToForEmc, type ShopAir } from './warm-to'
import { humidityRatioOf, waterByAirChangesKgPerH, waterInAirKg, waterInWoodKg } from './water'

/** A shop and what is wanted of it. What is left out is not assumed: the answers that need it are left out too. */
export type ShopQuestion = {
  readonly volumeM3: number
  readonly air: ShopAir
  readonly targetEmcPct: number
  readonly outdoorC?: number | undefined
  readonly outdoorHumidityPct?: number | undefined
  readonly airChangesPerH?: number | undefined
  /** Dry mass of the wood in there, kg. */
  readonly woodKg?: number | undefined
  /** Loss of walls, roof and floor together, W/K. */
  readonly shellWPerK?: number | undefined
  readonly heater?: HeaterKind | undefined
  /** Cold iron or a wall, as measured, °C. */
  readonly surfaceC?: number | undefined
}

export type ShopAnswer = {
  readonly emcPct: number
  /** Wood there ends at the wanted MC or below it as it is: nothing is to be warmed or dried. */
  readonly isDryEnough: boolean
  /** Warm it to this, and the humidity it then has; undefined where that is not needed or over 35 °C. */
  readonly warmTo: ShopAir | undefined
  /** Or dry it to this at the temperature it has, % RH; undefined where not needed. */
  readonly dryToHumidityPct: number | undefined
  /** Once, from the air; undefined where nothing is to be taken out. */
  readonly waterInAirKg: number | undefined
  /** From the wood over weeks; undefined where its mass is not known or nothing is to be taken out. */
  readonly waterInWoodKg: number | undefined
  /** Heat that drying sets free or takes, for all that water, kWh. */
  readonly latentHeatKwh: number | undefined
  /** What outdoor air brings in each hour while it is held dry at the temperature it has (negative: takes away). */
  readonly waterByAirKgPerH: number | undefined
  readonly airing: Airing | undefined
  readonly heating: ShopHeating | undefined
  readonly surface: SurfaceAnswer | undefined
  /**
   * In the air warmed by that heater: a measured surface still as cold, for iron lags the air; an assumed one warmed
   * along with the room.
   */
  readonly surfaceWhenHeated: SurfaceAnswer | undefined
  readonly cautions: readonly ShopCaution[]
}

/** Holding the shop at `warmTo`. */
export type ShopHeating = HoldingHeat & {
  /** What it is warmer than: the outdoor air, or the shop as it is now where that is not known. */
  readonly warmerThan: 'outdoors' | 'now'
  readonly warmerByK: number
  /** Water that the heater adds; undefined where its kind is not told. Without the shell a least figure. */
  readonly heaterWaterKgPerH: number | undefined
  /** Where the humidity heads with that heater, % RH; undefined without air changes, or where water would condense. */
  readonly humidityWithHeaterPct: number | undefined
  readonly emcWithHeaterPct: number | undefined
  /** The heater's water is more than the air can carry off: it condenses in the room. */
  readonly condenses: boolean
}

/**
 * All that can be said about making a shop fit for wood, from what is known of it.
 * @throws RangeError for an input out of range or NaN
 */
export function shopAnswer(question: ShopQuestion): ShopAnswer {
  const { air, targetEmcPct, volumeM3, woodKg } = question
  const now = emcPct(air.temperatureC, air.humidityPct)
  const warm = warmToForEmc(air, targetEmcPct)
  const dry = dryToForEmc(air, targetEmcPct)
  const outdoor = outdoorOf(question)
  const inAirKg = dry.ok ? waterInAirKg(volumeM3, air.temperatureC, air.humidityPct, dry.value) : undefined
  const inWoodKg = dry.ok && woodKg !== undefined ? waterInWoodKg(woodKg, now, targetEmcPct) : undefined
  const heating = warm.ok ? heatingOf(question, warm.value) : undefined
  const surface = surfaceOf(question, air.temperatureC)
  const surfaceNow = surface === undefined ? undefined : surfaceAnswer(air, surface)
  const surfaceLater = warm.ok ? surfaceOf(question, warm.value.temperatureC) : undefined
  const heated = warm.ok ? heatedAir(warm.value, heating) : undefined
  return {
    emcPct: now,
    isDryEnough: !dry.ok,
    warmTo: warm.ok ? warm.value : undefined,
    dryToHumidityPct: dry.ok ? dry.value : undefined,
    waterInAirKg: inAirKg,
    waterInWoodKg: inWoodKg,
    latentHeatKwh: inAirKg === undefined ? undefined : latentHeatKwh(inAirKg + (inWoodKg ?? 0)),
    waterByAirKgPerH: dry.ok ? waterByAirOf(question, outdoor, dry.value) : undefined,
    airing: outdoor === undefined ? undefined : airing(air, outdoor),
    heating,
    surface: surfaceNow,
    surfaceWhenHeated:
      surfaceLater === undefined || heated === undefined ? undefined : surfaceAnswer(heated, surfaceLater),
    cautions: shopCautions({
      isToBeChanged: dry.ok,
      heater: question.heater,
      temperatureC: air.temperatureC,
      driestHumidityPct: dry.ok ? dry.value : undefined,
      humidityPct: air.humidityPct,
      surfaceState: surfaceNow?.state,
    }),
  }
}

function outdoorOf({ outdoorC, outdoorHumidityPct }: ShopQuestion): ShopAir | undefined {
  return outdoorC === undefined || outdoorHumidityPct === undefined
    ? undefined
    : { temperatureC: outdoorC, humidityPct: outdoorHumidityPct }
}

function surfaceOf({ surfaceC, outdoorC }: ShopQuestion, roomC: number) {
  if (surfaceC !== undefined) return { temperatureC: surfaceC, from: 'measured' } as const
  return outdoorC === undefined ? undefined : assumedSurface(roomC, outdoorC)
}

function waterByAirOf(
  { volumeM3, airChangesPerH, air }: ShopQuestion,
  outdoor: ShopAir | undefined,
  dryToHumidityPct: number,
): number | undefined {
  if (airChangesPerH === undefined || outdoor === undefined) return undefined
  const held = { temperatureC: air.temperatureC, humidityPct: dryToHumidityPct }
  return waterByAirChangesKgPerH(volumeM3, airChangesPerH, humidityRatioOf(outdoor), humidityRatioOf(held))
}

const W_PER_KW = 1000

function heatingOf(question: ShopQuestion, warmTo: ShopAir): ShopHeating | undefined {
  const { air, airChangesPerH, outdoorC, shellWPerK, heater, volumeM3 } = question
  if (airChangesPerH === undefined) return undefined
  const warmerByK = Math.max(0, warmTo.temperatureC - (outdoorC ?? air.temperatureC))
  const heat = holdingHeat(volumeM3, airChangesPerH, warmerByK, shellWPerK)
  const base = {
    ...heat,
    warmerThan: outdoorC === undefined ? ('now' as const) : ('outdoors' as const),
    warmerByK,
  }
  if (heater === undefined) return { ...base, heaterWaterKgPerH: undefined, ...NO_HUMIDITY, condenses: false }
  const heaterWaterKgPerH = (heaterWaterKgPerKwh(heater) * (heat.airW + (heat.shellW ?? 0))) / W_PER_KW
  if (airChangesPerH === 0) return { ...base, heaterWaterKgPerH, ...NO_HUMIDITY, condenses: false }
  const incoming = humidityRatioOf(outdoorOf(question) ?? air)
  const humidityPct = heatedHumidityPct(
    { volumeM3, airChangesPerH, temperatureC: warmTo.temperatureC },
    incoming,
    heaterWaterKgPerH,
  )
  if (humidityPct > 100) return { ...base, heaterWaterKgPerH, ...NO_HUMIDITY, condenses: true }
  return {
    ...base,
    heaterWaterKgPerH,
    humidityWithHeaterPct: humidityPct,
    emcWithHeaterPct: emcPct(warmTo.temperatureC, humidityPct),
    condenses: false,
  }
}

const NO_HUMIDITY = { humidityWithHeaterPct: undefined, emcWithHeaterPct: undefined }

/** The warmed air that meets cold iron: saturated where the heater's water condenses anyway. */
function heatedAir(warmTo: ShopAir, heating: ShopHeating | undefined): ShopAir {
  if (heating?.condenses === true) return { ...warmTo, humidityPct: 100 }
  return { ...warmTo, humidityPct: heating?.humidityWithHeaterPct ?? warmTo.humidityPct }
}
