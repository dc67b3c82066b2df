import { dewPointC } from '@/lib/air/dew-point'
import { humidityRatio, vapourPressurePa } from '@/lib/air/humidity'
import { emcPct, TYPICAL_HUMIDITY_DOUBT_PCT } from '@/lib/wood/emc'
import { humidityRatioOf } from './water'
import { warmedHumidityPct, type ShopAir } from './warm-to'

export type Airing = {
  /** Whether airing dries the room, wets it, or makes no difference that two usual sensors could tell. */
  readonly effect: 'dries' | 'wets' | 'no-telling-difference'
  readonly roomRatio: number
  readonly outdoorRatio: number
  /** Undefined for air without water. */
  readonly roomDewPointC: number | undefined
  readonly outdoorDewPointC: number | undefined
  /** Humidity of the outdoor air brought to the room's temperature, % RH; over 100 means that it condenses there. */
  readonly humidityAfterPct: number
  /** What wood tends to in a room aired like that and kept at its temperature, % MC; undefined where it condenses. */
  readonly emcAfterPct: number | undefined
  /** What wood tends to in a room that goes all the way to the outdoor air, temperature and all, % MC. */
  readonly emcOutdoorsPct: number
}

/**
 * What letting in outdoor air does. The water in the air decides, by humidity ratio (or dew point, which says the same);
 * RH does not, for damp-looking cold air is often the drier.
 * @param room air in the shop, -10 to 50 °C and 0 to 100 % RH
 * @param outdoor air outside, likewise
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived; comparison of humidity ratios, ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 20.
 */
export function airing(room: ShopAir, outdoor: ShopAir): Airing {
  const emcOutdoorsPct = emcPct(outdoor.temperatureC, outdoor.humidityPct)
  const roomRatio = humidityRatioOf(room)
  const outdoorRatio = humidityRatioOf(outdoor)
  const doubt = Math.hypot(ratioDoubt(room), ratioDoubt(outdoor))
  const apart = outdoorRatio - roomRatio
  const humidityAfterPct = warmedHumidityPct(outdoor, room.temperatureC)
  return {
    effect: Math.abs(apart) <= doubt ? 'no-telling-difference' : apart < 0 ? 'dries' : 'wets',
    roomRatio,
    outdoorRatio,
    roomDewPointC: dewPointOf(room),
    outdoorDewPointC: dewPointOf(outdoor),
    humidityAfterPct,
    emcAfterPct: humidityAfterPct > 100 ? undefined : emcPct(room.temperatureC, humidityAfterPct),
    emcOutdoorsPct,
  }
}

/** What a usual sensor's ± 3 % RH leaves open, kg/kg. */
const ratioDoubt = (air: ShopAir): number =>
  humidityRatio(vapourPressurePa(air.temperatureC, TYPICAL_HUMIDITY_DOUBT_PCT, 'water'))

/** Dew point of a room's air by its sensor, °C; undefined for air with next to no water. */
export function dewPointOf(air: ShopAir): number | undefined {
  const found = dewPointC(vapourPressurePa(air.temperatureC, air.humidityPct, 'water'), 'water')
  return found.ok ? found.value : undefined
}
