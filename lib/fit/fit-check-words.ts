import {
  formatCount,
  formatEmc,
  formatEmcFigure,
  formatFineLength,
  formatLength,
  formatPoints,
} from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import type { FitGrade } from '@/lib/pieces/piece'
import type { UnitSystem } from '@/lib/sites/site'
import type { FitCheck, FitCheckInput, TargetYear } from './fit-check'
import { GRADE_FIGURES } from './grades'
import { formatWorkedLength } from './worked-figures'

export type FitCheckWords = {
  /** Verb first; the strong part is the verdict. */
  readonly headline: readonly TextPart[]
  /** Why, and what 1 in 10 like it would do. */
  readonly second: string
  /** What the answer rests on, one line each. */
  readonly restsOn: readonly string[]
  /** What nobody told and was taken for granted, one line each. */
  readonly assumed: readonly string[]
}

export const verdictWords = {
  cut: 'Cut it',
  'cut-easy': 'Cut it easy',
  rest: 'Let it rest',
} as const

export const stretchWords = {
  'cut-snug': 'cut it snug',
  cut: 'cut it',
  'cut-easy': 'cut it easy',
  rest: 'let it rest',
} as const

const wordsOnly = {
  'wild-grain': [
    'It moves its own way: fit it easy, test it.',
    'No ovals are worked out for burr, crotch or wood from near the pith.',
  ],
  stabilised: [
    'Stabilised wood is not worked out to move; its plain parts do.',
    'Ask again for a lid or a base of plain wood.',
  ],
  threaded: [
    "Threads aren't worked out: leave them easy, and log how they turn.",
    'Turn a trial pair of the same wood if it matters.',
  ],
} as const

const targetName = (target: TargetYear): string => (target.basis === 'home' ? 'its home' : 'its keep room')

/** Why it isn't simply cut: it stands off its home's middle by a telling difference, or the year itself takes so much. */
function because({ grade, target }: FitCheckInput, check: FitCheck & { kind: 'verdict' }): string {
  if (Math.abs(check.fromMiddlePct) < noTellingDifferencePct) {
    return `${targetName(target)}'s year takes more than ${article(grade).toLowerCase()} lid has to lose`
  }
  const side = check.fromMiddlePct > 0 ? 'damper' : 'drier'
  return `it is about ${formatPoints(check.fromMiddlePct)} of % MC ${side} than ${targetName(target)}`
}

/**
 * The answer before cutting, in words.
 * @param input what was asked
 * @param check what came out of it
 * @param units the reader's
 * @param assumed what else was taken for granted, one line each: the wood, say
 */
export function fitCheckWords(
  input: FitCheckInput,
  check: FitCheck,
  units: UnitSystem = 'metric',
  assumed: readonly string[] = [],
): FitCheckWords {
  if (check.kind === 'words') {
    const [headline, second] = wordsOnly[check.reason]
    return { headline: say`${strong(headline)}`, second, restsOn: [], assumed }
  }
  return {
    headline: headlineOf(input, check, units),
    second: secondOf(input, check, units),
    restsOn: restsOn(input, units),
    assumed: [
      ...assumed,
      ...(input.target.months < 12
        ? [`A year is told from ${formatCount(input.target.months, 'month')} of record.`]
        : []),
      ...(input.woodKind === 'hybrid'
        ? ['Only the plain part of a hybrid moves; all of it is counted.']
        : []),
      `${article(input.grade)} lid is taken to have ${gradeFigures(input.grade, units)}.`,
    ],
  }
}

function headlineOf(
  input: FitCheckInput,
  check: FitCheck & { kind: 'verdict' },
  units: UnitSystem,
): readonly TextPart[] {
  const verdict = strong(verdictWords[check.verdict])
  if (check.verdict === 'cut') {
    return say`${verdict}: ${targetName(input.target)}'s year leaves ${article(input.grade).toLowerCase()} lid its fit.`
  }
  if (check.verdict === 'cut-easy') {
    const more = formatFineLength(check.extraMm, units)
    return say`${verdict}: leave about ${strong(more)} more than you want, because ${because(input, check)}.`
  }
  if (check.reason === 'doubt') {
    return say`${verdict} until its moisture content is better known: it is known only to ± ${formatPoints(input.mcDoubtPct)} of % MC. Weigh it.`
  }
  if (check.reason === 'year') {
    return say`${verdict}, or choose a looser fit: ${targetName(input.target)}'s year takes more than ${article(input.grade).toLowerCase()} lid has, whatever it is cut at.`
  }
  return say`${verdict}: ${because(input, check)}.`
}

function secondOf(input: FitCheckInput, check: FitCheck & { kind: 'verdict' }, units: UnitSystem): string {
  const loss = formatFineLength(check.lossMm, units)
  const high = formatFineLength(check.lossHighMm, units)
  const allowed = formatWorkedLength(check.allowanceMm, units)
  const oneInTen = high === loss ? '' : `, 1 in 10 like it ${high} or more`
  const takes = `Cut now, the joint may lose about ${loss} at a quarter turn in a year${oneInTen}; ${article(input.grade).toLowerCase()} lid may lose ${allowed}.`
  if (check.verdict !== 'rest' || check.cutBetween === undefined || check.reason === 'doubt') return takes
  const { fromMcPct, toMcPct, kind } = check.cutBetween
  return `${takes} ${verdictWords[kind === 'cut' ? 'cut' : 'cut-easy']} when it reads ${formatEmcFigure(fromMcPct)} to ${formatEmc(toMcPct)}.`
}

function restsOn({ mcPct, mcDoubtPct, target, diameterMm }: FitCheckInput, units: UnitSystem): string[] {
  const name = target.basis === 'home' ? "The home's" : "The keep room's"
  return [
    `${name} year: ${formatEmcFigure(target.lowMcPct)} to ${formatEmc(target.highMcPct)}, its middle ${formatEmcFigure(target.middleMcPct)}.`,
    `The piece now: ${formatEmc(mcPct)}, 8 in 10 from ${formatEmcFigure(Math.max(0, mcPct - mcDoubtPct))} to ${formatEmcFigure(mcPct + mcDoubtPct)}.`,
    `A joint of ${formatLength(diameterMm, units)}, tried at every turn.`,
  ]
}

const article = (grade: FitGrade): string => (grade === 'easy' ? 'An easy' : `A ${grade}`)

function gradeFigures(grade: FitGrade, units: UnitSystem): string {
  const { clearanceMm, allowanceMm } = GRADE_FIGURES[grade]
  const clearance = formatFineLength(Math.abs(clearanceMm), units)
  const has = clearanceMm < 0 ? `${clearance} too little` : `${clearance} of clearance`
  return allowanceMm === undefined
    ? has
    : `${has} and to keep its fit until ${formatWorkedLength(allowanceMm, units)} of it is lost (a guess)`
}
