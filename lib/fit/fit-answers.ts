import { formatEmc, formatEmcFigure, formatFineLength } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { mostExtraMm, type FitCheck, type FitCheckInput, type FitVerdict } from './fit-check'
import type { FitStretch } from './fit-stretches'

export type FitAnswer = { readonly verdict: FitVerdict; readonly holds: boolean; readonly words: string }

const printed = ({ fromMcPct, toMcPct }: { fromMcPct: number; toMcPct: number }): string =>
  `${formatEmcFigure(fromMcPct)} to ${formatEmc(toMcPct)}`

/** "9.5 to 9.7 % MC", or the two sides of a better stretch: "7.4 to 9.5 or 9.7 to 11.9 % MC". */
function whereWords(stretches: readonly FitStretch[]): string | undefined {
  const [first, second] = stretches
  if (first === undefined) return undefined
  if (second === undefined) return printed(first)
  return `${formatEmcFigure(first.fromMcPct)} to ${formatEmcFigure(first.toMcPct)} or ${printed(second)}`
}

/** From the driest to the dampest place where it may be cut as wanted, a tighter fit in its middle included. */
function cutSpan(stretches: readonly FitStretch[]): readonly FitStretch[] {
  const [first, ...rest] = stretches.filter(({ kind }) => kind === 'cut' || kind === 'cut-snug')
  if (first === undefined) return []
  return [{ ...first, toMcPct: rest.at(-1)?.toMcPct ?? first.toMcPct }]
}

/**
 * The three answers side by side: when each is the right one, and which holds now.
 * @returns cut it, cut it easy, let it rest, in that order
 */
export function fitAnswers(
  input: FitCheckInput,
  check: FitCheck & { kind: 'verdict' },
  units: UnitSystem = 'metric',
): readonly FitAnswer[] {
  const cut = whereWords(cutSpan(check.stretches))
  const easy = whereWords(check.stretches.filter(({ kind }) => kind === 'cut-easy'))
  const most = formatFineLength(mostExtraMm(input.grade), units)
  const snug = check.stretches.find(({ kind }) => kind === 'cut-snug')
  const answers: readonly (readonly [FitVerdict, string])[] = [
    [
      'cut',
      cut === undefined
        ? 'At no moisture content: its year takes more than that fit has to lose.'
        : `When it reads ${cut}.${snug === undefined ? '' : ` From ${printed(snug)} even a snug lid keeps its fit.`}`,
    ],
    [
      'cut-easy',
      easy === undefined
        ? 'Leaving more would not do.'
        : check.extraMm > 0
          ? `Now, with about ${formatFineLength(check.extraMm, units)} more left. So from ${easy}.`
          : `When it reads ${easy}: up to ${most} more left.`,
    ],
    ['rest', restWords(check)],
  ]
  return answers.map(([verdict, words]) => ({ verdict, words, holds: verdict === check.verdict }))
}

function restWords({ reason, cutBetween }: FitCheck & { kind: 'verdict' }): string {
  if (reason === 'doubt')
    return 'Now: weigh it, or let it come to rest in one room, until it is better known.'
  if (cutBetween === undefined)
    return 'Resting alone does not help: choose a looser fit or a wood that moves less.'
  return `${reason === 'far' ? 'Now: keep it' : 'Any further off: keep it'} where it is to live, or in air like that, until it is there.`
}
