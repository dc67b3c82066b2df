import type { Field } from '@/lib/bench/fields'
import { UNKNOWN_SPECIES } from '@/lib/bench/query'
import { timeOutAnswer, type TimeOutAnswer, type TimeOutQuery } from '@/lib/bench/time-out'
import { GRADE_FIGURES } from '@/lib/fit/grades'
import { formatEmc, formatFineLength, formatPoints } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { formatDuration } from '@/lib/format/times'
import type { UnitSystem } from '@/lib/sites/site'
import { emcPct } from '@/lib/wood/emc'
import { findSpecies } from '@/lib/wood/species'
import type { Twin } from '../../_components/api-twin'
import type { Fact } from '../../_components/facts'

const air = (label: string, temperature: string, humidity: string) => ({
  temperature: {
    label: `Temperature ${label}`,
    kind: 'temperature',
    min: -10,
    max: 50,
    start: temperature,
  } as const,
  humidity: { label: `Humidity ${label}`, kind: 'humidity', min: 0, max: 100, start: humidity } as const,
})
const from = air('where it lives', '20.6', '45')
const to = air('where it goes', '8', '71')

export const timeOutFields = {
  diameterMm: { label: 'Joint diameter', kind: 'length', min: 1, max: 1000, start: '62' },
  wallMm: { label: 'Wall at the spigot', kind: 'length', min: 0.5, max: 60, start: '2.5' },
  spigotMm: { label: 'Length of the spigot', kind: 'length', min: 0.5, max: 60, start: '6' },
  lidMm: { label: 'Thickness of the lid', kind: 'length', min: 0.5, max: 100, start: '8' },
  lidWallMm: { label: 'Wall of the hollow lid', kind: 'length', min: 0.5, max: 60, start: '3' },
  allowanceMm: { label: 'What the joint may lose', kind: 'fine-length', min: 0.01, max: 5, start: '0.15' },
  fromC: from.temperature,
  fromRh: from.humidity,
  toC: to.temperature,
  toRh: to.humidity,
} as const satisfies Record<string, Field>

export type TimeOutField = keyof typeof timeOutFields

export const fits = ['suction', 'snap', 'snug', 'easy', 'loose', 'own'] as const
export const covers = ['open', 'lid-on', 'closed'] as const
export const lids = ['plug', 'hollow', 'any'] as const

/** What is chosen in the sentence rather than typed. */
export type TimeOutChoices = {
  /** Latin name with hyphens; empty where the wood is not known. */
  wood: string
  fit: (typeof fits)[number]
  cover: (typeof covers)[number]
  lid: (typeof lids)[number]
}

export const lidWords: Readonly<Record<TimeOutChoices['lid'], string>> = {
  plug: 'a plug lid',
  hollow: 'a hollow lid',
  any: 'a lid that keeps step with it',
}
export const coverNames: Readonly<Record<TimeOutChoices['cover'], string>> = {
  open: 'open in work',
  'lid-on': 'lid on, handled',
  closed: 'at rest, lid on',
}

/** Fields that this choice leaves out of the sentence. */
export function idleFields({ fit, lid }: TimeOutChoices): TimeOutField[] {
  return [
    ...(fit === 'own' ? [] : (['allowanceMm'] as const)),
    ...(lid === 'plug' ? [] : (['lidMm'] as const)),
    ...(lid === 'hollow' ? [] : (['lidWallMm'] as const)),
  ]
}

const rounded = (value: number): number => Math.round(value * 10_000) / 10_000

/** The question as the API takes it: the two airs become where wood stands and where it would end. */
export function timeOutQuery(
  values: Readonly<Record<TimeOutField, number>>,
  { wood, fit, cover, lid }: TimeOutChoices,
): TimeOutQuery {
  const known = findSpecies(wood)
  const allowanceMm =
    fit === 'own' ? values.allowanceMm : (GRADE_FIGURES[fit].allowanceMm ?? values.allowanceMm)
  return {
    species: known?.slug ?? UNKNOWN_SPECIES,
    diameterMm: values.diameterMm,
    wallMm: values.wallMm,
    spigotMm: values.spigotMm,
    cover,
    allowanceMm,
    fromMcPct: rounded(emcPct(values.fromC, values.fromRh)),
    toEmcPct: rounded(emcPct(values.toC, values.toRh)),
    temperatureC: values.toC,
    ...(lid === 'plug' ? { lidForm: 'plug' as const, lidMm: values.lidMm } : {}),
    ...(lid === 'hollow' ? { lidForm: 'hollow' as const, lidWallMm: values.lidWallMm } : {}),
  }
}

export type BenchTimeOut = {
  query: TimeOutQuery
  answer: TimeOutAnswer
  isWoodKnown: boolean
  fit: TimeOutChoices['fit']
}

export function benchTimeOut(
  values: Readonly<Record<TimeOutField, number>>,
  choices: TimeOutChoices,
): BenchTimeOut {
  const query = timeOutQuery(values, choices)
  return {
    query,
    answer: timeOutAnswer(query),
    isWoodKnown: query.species !== UNKNOWN_SPECIES,
    fit: choices.fit,
  }
}

/** "Bring it in within 2 h 10 min; more likely good until about 4 h 40 min." */
export function timeOutSentence({ answer }: BenchTimeOut): TextPart[] {
  if (!answer.binds && answer.minutesEarly !== undefined)
    return say`Bring it in within ${strong(formatDuration(answer.minutesEarly))}, though it more likely keeps its fit there for good.`
  if (!answer.binds) return say`${answer.words}`
  return say`Bring it in within ${strong(formatDuration(answer.minutesEarly))}; it is more likely good until about ${formatDuration(answer.minutes)}.`
}

/** Some never bind there: then no late edge can be told. */
export const lateWords = (minutesLate: number | undefined): string =>
  minutesLate === undefined
    ? 'More than 1 in 10 keep their fit for good.'
    : `1 in 10 keep their fit past ${formatDuration(minutesLate)}.`

export function timeOutFacts({ query, answer, isWoodKnown, fit }: BenchTimeOut, units: UnitSystem): Fact[] {
  const apart = query.toEmcPct - query.fromMcPct
  return [
    {
      name: 'From one air to the other',
      figure: `${formatEmc(query.fromMcPct)} to ${formatEmc(query.toEmcPct)}`,
      words: `The wood is taken to match the first; given time it ends at the second, ${formatPoints(apart)} ${apart < 0 ? 'drier' : 'damper'} (points are % MC).`,
    },
    ...(answer.minutesEarly === undefined
      ? []
      : [
          {
            name: 'Early edge',
            figure: formatDuration(answer.minutesEarly),
            words: 'By then 1 in 10 like it may bind. This is the one to keep.',
          },
        ]),
    ...(answer.binds
      ? [
          {
            name: 'Middle',
            figure: `about ${formatDuration(answer.minutes)}`,
            words: `As many bind before as after. ${lateWords(answer.minutesLate)}`,
          },
        ]
      : []),
    {
      name: 'What the joint may lose',
      figure: formatFineLength(query.allowanceMm, units),
      words:
        fit === 'own'
          ? 'As you say. A quarter turn on is where it is lost.'
          : 'A guess for that grade of fit, half of it either way. A quarter turn on is where it is lost.',
    },
    {
      name: 'The wood',
      figure: isWoodKnown ? (findSpecies(query.species ?? '')?.commonName ?? '') : 'not known',
      words: woodWords(answer, isWoodKnown),
    },
  ]
}

function woodWords(answer: TimeOutAnswer, isWoodKnown: boolean): string | undefined {
  const words = [
    ...(isWoodKnown
      ? []
      : ['Taken as one of medium movement, 650 kg/m³; its movement may be 40 % more or less.']),
    ...(isWoodKnown && answer.assumed.includes('movement')
      ? ['No movement is published: that of its class stands.']
      : []),
    ...(isWoodKnown && answer.assumed.includes('density')
      ? ['No density is known: a middling one stands.']
      : []),
    ...(answer.flags.includes('oily-wood')
      ? ['Oily: it takes up less water than this reckons with, so it may last longer.']
      : []),
  ]
  return words.length === 0 ? undefined : words.join(' ')
}

export function timeOutTwin({ query }: BenchTimeOut): Twin {
  const asked = Object.entries(query).filter(
    (pair): pair is [string, string | number] => pair[1] !== undefined,
  )
  return { path: '/bench/time-out', query: Object.fromEntries(asked) }
}

/** The same box and airs on the page that turns its lid. An allowance is no clearance: that is asked there. */
export function lidFitAddress(
  texts: Readonly<Record<TimeOutField, string>>,
  { wood, fit }: TimeOutChoices,
): string {
  const query = new URLSearchParams({
    tell: 'air',
    wood,
    ...(fit === 'own' ? {} : { fit }),
    diameterMm: texts.diameterMm,
    cutC: texts.fromC,
    cutRh: texts.fromRh,
    nowC: texts.toC,
    nowRh: texts.toRh,
  })
  return `/bench/fit?${query.toString()}`
}
