import { formatEmcFigure, formatPoints } from '@/lib/format/figures'
import type { RoomForecastView } from './forecast-view'

/** The leads that are told in words, hours. */
const TOLD_LEADS = [6, 12, 24]

const METHOD_WORDS = {
  record: 'the forecast',
  'same-as-now': '“same as now”',
  yesterday: '“same as yesterday”',
} as const

/** "0.2 points of % MC": to a tenth; below that to a hundredth, which is where such errors lie indoors. */
const points = (value: number): string =>
  value < 0.095 ? `${(Math.round(value * 100) / 100).toFixed(2)} points` : formatPoints(value)

/** How good forecasts of a room have been, beside the two simplest ones. */
export function goodnessWords(leads: RoomForecastView['goodness']['leads']): string[] {
  const told = leads.filter(({ leadH, n }) => TOLD_LEADS.includes(leadH) && n > 0)
  if (told.length === 0) return ['Not yet known: a forecast is scored once its hours have come.']
  return told.map(({ leadH, method, recordPct, sameAsNowPct, yesterdayPct }) => {
    const yesterday = yesterdayPct === null ? '' : `, “same as yesterday” by ${points(yesterdayPct)}`
    const used = method === 'record' ? '' : ` So ${METHOD_WORDS[method]} is used for hours that far ahead.`
    return `${String(leadH)} h ahead the forecast was off by about ${points(recordPct)} of % MC, “same as now” by ${points(sameAsNowPct)}${yesterday}.${used}`
  })
}

interface Told {
  hours: RoomForecastView['hours']
  warmed: RoomForecastView['warmed']
  usesOutdoors: boolean
  usesLastYear: boolean
}

/** What the coming hours are expected to be, and from what: for reading, not for judging a piece. */
export function forecastWords({ hours, warmed, usesOutdoors, usesLastYear }: Told): string[] {
  if (hours.length === 0)
    return ['No forecast yet: it takes a week of readings, with the last hour among them.']
  const emc = hours.map((hour) => hour.emcPct)
  const low = formatEmcFigure(Math.min(...emc))
  const high = formatEmcFigure(Math.max(...emc))
  const range = low === high ? `about ${low} % MC throughout` : `between about ${low} and ${high} % MC`
  const from = [
    'its own record',
    ...(usesLastYear ? ['the same weeks of last year'] : []),
    ...(usesOutdoors ? ['the air outdoors'] : []),
  ]
  const lit = warmed?.hours.map((hour) => hour.emcPct) ?? []
  return [
    `Over the next 48 hours the air here would keep wood ${range}, as if nobody warmed it. From ${listed(from)}.`,
    ...(warmed === null || lit.length === 0
      ? []
      : [
          `If you light it at ${warmed.litAtTime}, it should fall to about ${formatEmcFigure(Math.min(...lit))} % MC. Never leave a heater alone with shavings or finishes.`,
        ]),
  ]
}

const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
