import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { aboutMass, aboutPower } from './about'
import { warmestShopC } from './policy'
import type { ShopAnswer, ShopQuestion } from './shop'

/**
 * The answer in sentences, the most useful first: warm or dry, the water, the airing, the heat, cold surfaces. Masses
 * and powers are told as "about", with two figures.
 */
export function shopWords(
  question: ShopQuestion,
  answer: ShopAnswer,
  units: UnitSystem = 'metric',
): string[] {
  return [
    conditionWords(question, answer, units),
    ...waterWords(question, answer),
    ...airingWords(answer, units),
    ...heatingWords(question, answer, units),
    ...surfaceWords(answer, units),
  ]
}

function conditionWords({ air, targetEmcPct }: ShopQuestion, answer: ShopAnswer, units: UnitSystem): string {
  const wanted = formatEmc(targetEmcPct)
  const ends = `Wood left there ends at about ${formatEmc(answer.emcPct)}.`
  if (answer.isDryEnough || answer.dryToHumidityPct === undefined)
    return `${ends} That is not damper than ${wanted}: neither warming nor drying is needed.`
  const at = formatTemperature(air.temperatureC, units)
  const dry = `dry it to about ${formatHumidity(answer.dryToHumidityPct)} at ${at}`
  if (answer.warmTo === undefined) {
    const most = formatTemperature(warmestShopC, units)
    return `${ends} For ${wanted}, ${dry}. Warming alone would take more than ${most}.`
  }
  const warm = formatTemperature(answer.warmTo.temperatureC, units)
  return `${ends} For ${wanted}, warm it to about ${warm}, which makes it ${formatHumidity(answer.warmTo.humidityPct)}; or ${dry}.`
}

function waterWords({ woodKg }: ShopQuestion, answer: ShopAnswer): string[] {
  if (answer.waterInAirKg === undefined) return []
  const air = `Drying takes ${aboutMass(answer.waterInAirKg)} of water out of the air`
  const wood =
    answer.waterInWoodKg === undefined
      ? `${air}; ${woodKg === undefined ? 'the wood and walls hold far more, so expect weeks' : 'the walls hold more'}.`
      : `${air}, and ${aboutMass(answer.waterInWoodKg)} out of the wood, which takes weeks.`
  if (answer.waterByAirKgPerH === undefined) return [wood]
  const brought = answer.waterByAirKgPerH
  const comes =
    brought >= 0
      ? `Held that dry, it takes in ${aboutMass(brought)} of water an hour with the air from outside.`
      : `Even held that dry, air from outside takes ${aboutMass(-brought)} of water away an hour.`
  return [wood, comes]
}

function airingWords({ airing }: ShopAnswer, units: UnitSystem): string[] {
  if (airing === undefined) return []
  const ends =
    airing.emcAfterPct === undefined
      ? 'At the shop’s temperature it would condense.'
      : `Aired and kept at its temperature, the shop tends to ${formatEmc(airing.emcAfterPct)}.`
  if (airing.effect === 'no-telling-difference')
    return [`Outdoor air makes no telling difference: it holds about as much water. ${ends}`]
  const outdoor = airing.outdoorDewPointC
  const dew = outdoor === undefined ? '' : ` (dew point ${formatTemperature(outdoor, units)})`
  return airing.effect === 'dries'
    ? [`Airing helps: the air outside holds less water${dew}. ${ends}`]
    : [`Keep it shut: the air outside holds more water${dew}. ${ends}`]
}

function heatingWords({ heater }: ShopQuestion, answer: ShopAnswer, units: UnitSystem): string[] {
  const { heating, warmTo } = answer
  if (heating === undefined || warmTo === undefined) return []
  const held = formatTemperature(warmTo.temperatureC, units)
  const than = heating.warmerThan === 'now' ? ', counted from the shop as it is now' : ''
  const shell =
    heating.shellW === undefined
      ? 'What goes through walls and roof comes on top, and is often more: it is not known here'
      : `Walls and roof take ${aboutPower(heating.shellW)}`
  const words = [`Holding ${held} takes ${aboutPower(heating.airW)} for the air${than}. ${shell}.`]
  if (heating.heaterWaterKgPerH === undefined) return words
  return [...words, heaterWords(heater, heating.heaterWaterKgPerH, answer)]
}

function heaterWords(heater: ShopQuestion['heater'], waterKgPerH: number, answer: ShopAnswer): string {
  const heads =
    answer.heating?.emcWithHeaterPct === undefined || answer.heating.humidityWithHeaterPct === undefined
      ? ''
      : ` With it the air heads for ${formatHumidity(answer.heating.humidityWithHeaterPct)}, which is ${formatEmc(answer.heating.emcWithHeaterPct)}.`
  if (heater !== 'unflued') return `That heater adds no water.${heads}`
  const wets = `An unflued heater adds ${aboutMass(waterKgPerH)} of water an hour${answer.heating?.shellW === undefined ? ' at least' : ''}.`
  if (answer.heating?.condenses === true)
    return `${wets} That is more than the air can carry off: it condenses.`
  return `${wets}${heads}`
}

function surfaceWords(answer: ShopAnswer, units: UnitSystem): string[] {
  const { surface, surfaceWhenHeated } = answer
  if (surface === undefined) return []
  const at = formatTemperature(surface.surfaceC, units)
  const what = surface.from === 'measured' ? `A surface at ${at}` : `A cold wall, taken to be at about ${at},`
  const now = {
    wet: `${what} is wet: that is at or below the dew point.`,
    'near-wet': `${what} is within a degree of the dew point, and may be wet.`,
    'mould-likely': `At ${surface.from === 'measured' ? `a surface at ${at}` : `a cold wall, taken to be at about ${at},`} the air has ${formatHumidity(surface.surfaceHumidityPct)}: mould may grow in weeks.`,
    dry: `${what} stays dry.`,
  }[surface.state]
  const wetsLater =
    surface.from === 'measured' && surface.state !== 'wet' && surfaceWhenHeated?.state === 'wet'
  return wetsLater
    ? [now, 'Once the air is warmed like that, water condenses on it until it is warm too.']
    : [now]
}
