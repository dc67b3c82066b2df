import { formatCount, formatEmc, formatMass, formatPoints } from '@/lib/format/figures'
import {
  dayMs,
  readyDoubtPctMax,
  readyWeights,
  restAfterNearFinalMs,
  restAfterRoughingMs,
  weekMs,
} from './policy'
import type { ReadyQuestion } from './ready-question'
import type { Steadiness } from './same-weight'

export type MissingCode =
  | 'too-few-weights'
  | 'weights-differ'
  | 'weights-not-corrected'
  | 'mc-unknown'
  | 'target-unknown'
  | 'mc-off'
  | 'doubt-too-wide'
  | 'roughed-unknown'
  | 'rest-after-roughing'
  | 'rest-after-near-final'

export type Missing = { readonly code: MissingCode; readonly words: string }

/** One sentence on what is missing, and where that helps on what to do. */
export function missingWords(code: MissingCode, question: ReadyQuestion, steadiness: Steadiness): string {
  const mass = (grams: number): string => formatMass(grams, question.units)
  switch (code) {
    case 'too-few-weights':
      return `It needs ${String(readyWeights)} weights over 8 weeks, and has ${soFar(steadiness)}.`
    case 'weights-differ':
      return `The last ${formatCount(steadiness.count, 'weight')} lie ${mass(steadiness.apartG)} apart; ${mass(steadiness.toleranceG)} is allowed.`
    case 'weights-not-corrected':
      return 'Some weights can’t be corrected for the room’s drift: its record has a gap there.'
    case 'mc-unknown':
      return 'Its MC is not known: a meter reading or an oven-dry weight would tell.'
    case 'target-unknown':
      return 'There is no year of air to compare it with: neither its home nor its keep room has a record.'
    case 'mc-off':
      return offWords(question)
    case 'doubt-too-wide':
      return `Its MC is known only to ± ${formatPoints(question.mc?.doubtPct ?? 0)} of % MC; ± ${formatPoints(readyDoubtPctMax)} is needed.`
    case 'roughed-unknown':
      return 'When it was roughed out is not known.'
    case 'rest-after-roughing':
      return restWords('roughed out', question.roughedAt, restAfterRoughingMs, question.now)
    case 'rest-after-near-final':
      return restWords('turned near its final size', question.nearFinalAt, restAfterNearFinalMs, question.now)
  }
}

function soFar({ count, overMs }: Steadiness): string {
  if (count === 0) return 'none so far'
  if (count === 1) return 'one so far'
  return `${String(count)} over ${formatCount(Math.floor(overMs / weekMs), 'week')} so far`
}

function offWords({ mc, target }: ReadyQuestion): string {
  if (mc === undefined || target === undefined) return ''
  const apart = mc.pct - target.pct
  const whose = target.of === 'home' ? 'its home’s' : 'its keep room’s'
  return `At about ${formatEmc(mc.pct)} it is ${formatPoints(apart)} ${apart > 0 ? 'damper' : 'drier'} than the middle of ${whose} year.`
}

function restWords(what: string, at: number | undefined, restMs: number, now: number): string {
  const left = at === undefined ? 0 : Math.ceil((at + restMs - now) / dayMs)
  return `It was ${what} not long ago and rests another ${formatCount(left, 'day')}.`
}

/** The answer in one go. */
export function readyWords(ready: boolean, byWeightAlone: boolean, missing: readonly Missing[]): string {
  if (!ready) return `Not ready yet. ${missing.map(({ words }) => words).join(' ')}`
  if (byWeightAlone)
    return 'Ready by weight alone: it weighs the same and has rested. Its MC was not asked for.'
  return 'Ready: it weighs the same, its MC matches, and it has rested.'
}
