import { formatDate } from '@/lib/format/times'
import type { Stage } from '@/lib/pieces/piece'
import { restAfterRoughingMs, dayMs } from './policy'
import type { ReadyAnswer } from './ready'
import type { Missing, MissingCode } from './ready-words'

type Clock = { readonly now: number; readonly timeZone: string }
type Due = { readonly dueAt: number; readonly isDue: boolean }

/** Time alone brings these; a range of days stands for them. */
const COME_WITH_TIME: readonly MissingCode[] = [
  'too-few-weights',
  'weights-differ',
  'mc-off',
  'rest-after-roughing',
  'rest-after-near-final',
]

/** What is missing, with a blank told as one. */
export const missingHere = (missing: Missing, stage: Stage): Missing =>
  missing.code === 'roughed-unknown' && stage === 'blank'
    ? { ...missing, words: 'It has not been roughed out, as far as is known: the rest counts from then.' }
    : missing

/** Where it stands, in a sentence. */
export function restWords(
  { ready, words, missing, span }: Pick<ReadyAnswer, 'ready' | 'words' | 'missing' | 'span'>,
  clock: Clock,
): string {
  if (ready) return words
  const waits = missing.every(({ code }) => COME_WITH_TIME.includes(code))
  if (span !== undefined && waits) return `Leave it resting: it may be ready ${rangeWords(span, clock)}.`
  const [first] = missing
  return first === undefined ? 'Not ready yet.' : `Not ready: ${lowered(first.words)}`
}

/** "between 10 May and 14 June": a range, and never a day. The year stands once, where it is another one. */
export function rangeWords(
  { fromAt, toAt }: { readonly fromAt: number; readonly toAt: number },
  { now, timeZone }: Clock,
): string {
  const [from, to] = [new Date(fromAt), new Date(toAt)]
  return `between ${formatDate(from, timeZone, to)} and ${formatDate(to, timeZone, new Date(now))}`
}

/** When to weigh it next. */
export function weighNextWords({ dueAt, isDue }: Due, isWeighed: boolean, { now, timeZone }: Clock): string {
  if (!isWeighed) return 'Weigh it now, and then once a month.'
  if (isDue) return 'It is due to be weighed.'
  return `Weigh it again on ${formatDate(new Date(dueAt), timeZone, new Date(now))}.`
}

const lowered = (sentence: string): string => `${sentence[0]?.toLowerCase() ?? ''}${sentence.slice(1)}`

type Met = Clock & {
  /** What is missing. */
  readonly codes: readonly MissingCode[]
  readonly isMatched: boolean
  /** When its rest after roughing ends or ended. */
  readonly restedOn: number | undefined
}

/** What the rule asks for and the piece has. */
export function metWords({ codes, isMatched, restedOn, now, timeZone }: Met): string[] {
  const has = (...asked: MissingCode[]): boolean => !asked.some((code) => codes.includes(code))
  const rest = `${String(restAfterRoughingMs / dayMs)} days since roughing`
  return [
    ...(has('too-few-weights', 'weights-differ', 'weights-not-corrected')
      ? ['It has weighed the same for eight weeks.']
      : []),
    ...(isMatched && has('mc-unknown', 'target-unknown', 'mc-off', 'doubt-too-wide')
      ? ['Its MC is within 0.7 points of the middle of its keep room’s year.']
      : []),
    ...(restedOn !== undefined && has('rest-after-roughing')
      ? [`${rest}: passed on ${formatDate(new Date(restedOn), timeZone, new Date(now))}.`]
      : []),
  ]
}
