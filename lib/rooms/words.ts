import { formatEmc, formatHumidity, formatPoints } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { mouldCautionHumidityPct, noTellingDifferencePct } from '@/lib/notices/policy'
import type { RoomAir, RoomDetail, RoomKind } from './room'

export interface RoomForWords {
  name: string
  kind: RoomKind
  air: RoomAir
  year: { emcPctMiddle: number; days: number } | null
  today: RoomDetail['today']
  month: RoomDetail['month']
  /** The keep room to set it against, if it is another one and its air is fresh. */
  keep: { name: string; emcPct: number } | null
}

/** One sentence that a maker could act on. */
export function roomHeadline(room: RoomForWords, timeZone: string, now: Date): string {
  const { air, keep, name } = room
  if (air.kind === 'never') return `No reading from ${name} yet. Add a sensor, or type in what a dial says.`
  if (air.kind === 'stale') {
    const since = formatMoment(air.at, timeZone, now)
    return `No reading from ${name} since ${since}; the last was ${formatEmc(air.emcPct)}. Look at its sensor.`
  }
  if (keep === null) return `${name} brings wood to about ${formatEmc(air.emcPct)}, given time.`
  const points = air.emcPct - keep.emcPct
  if (Math.abs(points) < noTellingDifferencePct)
    return `There is no telling difference between ${name} and ${keep.name}: ${formatEmc(air.emcPct)}.`
  const way = points > 0 ? 'damper' : 'drier'
  const change = points > 0 ? 'swell' : 'shrink'
  return `${name} is ${formatPoints(points)} ${way} than ${keep.name}: wood from there would ${change} here, given time.`
}

/** What else the figures say, in plain words. */
export function roomWords(room: RoomForWords): string[] {
  const words: string[] = []
  if (room.today !== null)
    words.push(`Today between ${formatEmc(room.today.emcPctMin)} and ${formatEmc(room.today.emcPctMax)}.`)
  if (room.month !== null && room.month.days > 1)
    words.push(
      `Over the last 30 days about ${formatEmc(room.month.emcPctMean)}, from ${formatEmc(room.month.emcPctMin)} to ${formatEmc(room.month.emcPctMax)}.`,
    )
  if (room.air.kind === 'fresh' && room.year !== null) words.push(againstYear(room.air.emcPct, room.year))
  if (room.air.kind === 'fresh' && room.air.isTyped) words.push('Typed in by hand, so the doubt is wider.')
  if (room.air.kind !== 'never' && room.air.flags.includes('above-95-rh'))
    words.push('Over 95 % RH the curve is not confirmed: take the figure as "very damp".')
  return words
}

function againstYear(emcPct: number, year: { emcPctMiddle: number; days: number }): string {
  const points = emcPct - year.emcPctMiddle
  const span =
    year.days >= 330 ? "its own year's middle" : `the middle of its ${String(year.days)} days on record`
  if (Math.abs(points) < noTellingDifferencePct)
    return `That is about ${span}, ${formatEmc(year.emcPctMiddle)}.`
  return `That is ${formatPoints(points)} ${points > 0 ? 'damper' : 'drier'} than ${span}, ${formatEmc(year.emcPctMiddle)}.`
}

/** Shown for as long as the reason stands; none can be put away for good. */
export function roomCautions(room: { kind: RoomKind; air: RoomAir }): string[] {
  if (room.air.kind === 'never' || room.air.humidityPct <= mouldCautionHumidityPct) return []
  const cautions = [
    `At ${formatHumidity(room.air.humidityPct)} mould can grow. Over about 80 % RH for long, move wood out and let air through (ASHRAE Standard 160; see HSE or your local health body on mould).`,
  ]
  if (room.kind === 'shop' || room.kind === 'store')
    cautions.push(
      'Heaters and dehumidifiers near dust and solvents can start a fire: never leave one unattended, keep leads off the floor, leave fixed wiring to an electrician. An unflued heater gives off carbon monoxide and wets the air (HSE, Electrical Safety First, NFPA; local codes come first).',
    )
  return cautions
}
