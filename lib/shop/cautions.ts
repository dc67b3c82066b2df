import { formatHumidity, formatTemperature } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import type { HeaterKind } from './heater'
import { compressorColdC, mouldSurfaceHumidityPct, tooDryHumidityPct } from './policy'

export type ShopCautionId =
  | 'heater-fire'
  | 'wiring'
  | 'carbon-monoxide'
  | 'ventilation'
  | 'wood-follows-slowly'
  | 'cold-dehumidifier'
  | 'too-dry'
  | 'condensation'
  | 'mould'

/** A caution with the bodies that publish guidance on it. Local codes and licensed practice come first, always. */
export type ShopCaution = {
  readonly id: ShopCautionId
  readonly words: string
  readonly bodies: readonly string[]
}

export type ShopCircumstances = {
  /** Something is to be warmed or dried at all. */
  readonly isToBeChanged: boolean
  /** Undefined: not told, and every kind is warned of. */
  readonly heater: HeaterKind | undefined
  readonly temperatureC: number
  /** The driest air that is advised, % RH. */
  readonly driestHumidityPct: number | undefined
  readonly surfaceState: 'wet' | 'near-wet' | 'mould-likely' | 'dry' | undefined
  readonly humidityPct: number
}

/** What to know before a shop is warmed or dried; only what applies. None can be put away for good. */
export function shopCautions(shop: ShopCircumstances, units: UnitSystem = 'metric'): ShopCaution[] {
  const cautions: ShopCaution[] = []
  const add = (id: ShopCautionId, words: string, ...bodies: string[]) => {
    cautions.push({ id, words: `${words} (${bodies.join(', ')}; local codes come first).`, bodies })
  }
  if (shop.isToBeChanged) {
    add(
      'heater-fire',
      'Keep heaters and dehumidifiers clear of dust and solvents, and never leave them running unattended',
      'NFPA',
      'HSE',
    )
    if (shop.heater !== 'unflued' && shop.heater !== 'flued') {
      add(
        'wiring',
        'No heater on a long or coiled extension lead; fixed wiring is work for an electrician',
        'Electrical Safety First',
        'NFPA',
      )
    }
    if (shop.heater === undefined || shop.heater === 'unflued') {
      add(
        'carbon-monoxide',
        'An unflued heater gives off carbon monoxide and wets the air: fit an alarm and let air in',
        'HSE',
        'NFPA',
      )
    }
    add('ventilation', 'Never cut ventilation for dust or fumes to hold the humidity', 'HSE', 'OSHA')
    cautions.push({
      id: 'wood-follows-slowly',
      words: 'The air follows within minutes, thin walls in hours to days, stock and the building in weeks.',
      bodies: [],
    })
    if (shop.temperatureC < compressorColdC) {
      const cold = formatTemperature(compressorColdC, units)
      cautions.push({
        id: 'cold-dehumidifier',
        words: `Below about ${cold} a compressor dehumidifier takes out little; a desiccant one still works.`,
        bodies: [],
      })
    }
    if (shop.driestHumidityPct !== undefined && shop.driestHumidityPct < tooDryHumidityPct) {
      cautions.push({
        id: 'too-dry',
        words: `Air under ${formatHumidity(tooDryHumidityPct)} may crack green and resting wood: keep that elsewhere.`,
        bodies: [],
      })
    }
  }
  if (shop.surfaceState === 'wet' || shop.surfaceState === 'near-wet') {
    cautions.push({
      id: 'condensation',
      words: 'Cold iron may be wet to the touch and rust: warm it along with the air, or cover it.',
      bodies: [],
    })
  }
  if (shop.humidityPct > mouldSurfaceHumidityPct || shop.surfaceState === 'mould-likely') {
    const over = formatHumidity(mouldSurfaceHumidityPct)
    add('mould', `Above about ${over} at a surface mould may grow within weeks`, 'ASHRAE', 'HSE')
  }
  return cautions
}
