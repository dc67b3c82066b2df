import { formatDuration } from '@/lib/format/times'
import { formatEmc, formatFineLength, formatPoints } from '@/lib/format/figures'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import type { FitGrade } from '@/lib/pieces/piece'
import type { PieceCheck, Verdict } from './carry-check'

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  fine: 'Fine',
  'keep-short': 'Keep it short',
  leave: 'Leave it where it is',
}

/** Less than half of the least step told is not worth a figure. */
const TOLD_FROM_MM = 0.025
const TOLD_FROM_POINTS = 0.05

const millimetres = (mm: number): string =>
  mm < TOLD_FROM_MM ? 'next to nothing' : `about ${formatFineLength(mm)}`

export type ReasonFigures = {
  readonly thereEmcPct: number
  readonly cutMcPct: number
  /** Change of the ring over the stay, % MC. */
  readonly changePct: number
  readonly stayMinutes: number
  /** At a quarter turn, at the end of the stay, counted from the cut. */
  readonly lossMm: number
  readonly allowanceMm: number
  readonly isPast: boolean
  /** What of the loss comes all round, because the two parts are not in step; below 0 the lid sits looser. */
  readonly allRoundMm: number
}

/** From this share of the loss on, the quarter turn is no longer what tells. */
const MOSTLY = 0.5

/** Why: in points of % MC, in the quarter turn, and in mm. */
export function reasonWords(figures: ReasonFigures): string {
  const sentences = [airWords(figures.thereEmcPct, figures.cutMcPct)]
  const isAllRound = figures.allRoundMm > MOSTLY * figures.lossMm && figures.lossMm >= TOLD_FROM_MM
  const lossWords = isAllRound
    ? `it is ${millimetres(figures.lossMm)} tighter all round`
    : `it is ${millimetres(figures.lossMm)} tighter one way and easier the other`
  if (figures.isPast) {
    sentences.push(
      `Its joint has already moved past its allowance of ${allowanceWords(figures.allowanceMm)}: turned a quarter, ${lossWords}.`,
    )
    return sentences.join(' ')
  }
  const turned = isAllRound ? 'whichever way it is turned' : 'turned a quarter'
  sentences.push(`${changeWords(figures.changePct, figures.stayMinutes)}; ${turned}, ${lossWords}.`)
  sentences.push(`Its allowance is ${allowanceWords(figures.allowanceMm)}.`)
  return sentences.join(' ')
}

/** Allowances go down to 0.03 mm: told to 0.01, or the tightest would read as another. */
const allowanceWords = (mm: number): string => `${mm.toFixed(2)}\u00a0mm`

function airWords(thereEmcPct: number, cutMcPct: number): string {
  const apart = thereEmcPct - cutMcPct
  if (Math.abs(apart) < noTellingDifferencePct) {
    return `The air there, ${formatEmc(thereEmcPct)}, is no telling difference from what its joint was cut at.`
  }
  const direction = apart > 0 ? 'damper' : 'drier'
  return `The air there, ${formatEmc(thereEmcPct)}, is ${formatPoints(apart)} ${direction} than its joint was cut at.`
}

function changeWords(changePct: number, stayMinutes: number): string {
  const stay = formatDuration(stayMinutes)
  if (Math.abs(changePct) < TOLD_FROM_POINTS) return `In ${stay} its ring hardly changes`
  return `In ${stay} its ring ${changePct > 0 ? 'takes up' : 'gives off'} about ${formatPoints(changePct)} of % MC`
}

export type SecondFigures = {
  readonly isPast: boolean
  readonly fitGrade: FitGrade | null
  /** Points either side of the cut at which the allowance is gone. */
  readonly allowedMcPct: number
  /** Early edge of the whole clearance being gone, from the start; undefined where that does not come, or isn't known. */
  readonly mayBindAfterMinutes: number | undefined
  /** The middle never uses up the allowance there, but 1 in 10 would. */
  readonly isWithinDoubt: boolean
  /** At the end of the stay, all round: above 0 the outer part lags and it tightens, below 0 it sits looser. */
  readonly allRoundMm: number
}

/** The second line: when it may bind, a suction lid's sigh, a fit that no sensor can call. Empty with nothing to add. */
export function secondWords(figures: SecondFigures): string {
  if (figures.isPast)
    return 'Never force it: line the grain up, keep the parts side by side, try it cold in about two days.'
  const sentences: string[] = []
  if (figures.allowedMcPct < noTellingDifferencePct) {
    sentences.push(
      `Its fit allows ${formatPoints(figures.allowedMcPct)} either way, less than any sensor can tell: go by the lid.`,
    )
  }
  const bind = figures.mayBindAfterMinutes
  if (figures.fitGrade === 'suction') {
    const when = bind === undefined ? '' : `, which may be after about ${formatDuration(bind)}`
    sentences.push(`Its sigh goes long before it may bind${when}.`)
  } else if (bind !== undefined) {
    sentences.push(`It may bind at a quarter turn after about ${formatDuration(bind)}.`)
  }
  if (figures.allRoundMm >= TOLD_FROM_MM)
    sentences.push('Lid and base are not in step: it tightens all round before the quarter turn tells.')
  if (figures.allRoundMm <= -TOLD_FROM_MM)
    sentences.push('Lid and base are not in step: for some hours it sits looser all round.')
  if (figures.isWithinDoubt) {
    sentences.push(
      'By the middle of the reckoning it would keep its fit there; the doubt is wider than that. Try the lid.',
    )
  }
  return sentences.join(' ')
}

type WordsCheck = Extract<PieceCheck, { kind: 'words' }>
type UnknownCheck = Extract<PieceCheck, { kind: 'unknown' }>

/** Pieces that get words and no verdict. */
export const PIECE_WORDS: Readonly<Record<WordsCheck['reason'], Omit<WordsCheck, 'kind' | 'reason'>>> = {
  blank: { words: 'A blank follows the air slowly: hours out there hardly count, weeks do.', second: '' },
  threaded: { words: "Threads aren't worked out.", second: 'Note how the lid turned when it is back.' },
  'wild-grain': { words: 'It moves its own way: fit it easy, test it.', second: '' },
  stabilised: { words: 'Not worked out to move.', second: 'Its plain parts do.' },
  'no-joint': {
    words: 'No joint size yet: measure the spigot and the check can be made.',
    second: '',
  },
}

/** What stands in place of a verdict. The page adds since when, in the site's zone. */
export const UNKNOWN_WORDS: Readonly<Record<UnknownCheck['reason'], string>> = {
  'no-reading': 'The air there is unknown: no fresh reading, so no verdict.',
  'never-read': 'The air there is unknown: it was never read, so no verdict.',
  'no-history': 'Nothing is known of the air that it comes from, so no verdict.',
}

/** A blank's line about the air there, when that was read lately. */
export const blankAirWords = (thereEmcPct: number): string => `The air there is at ${formatEmc(thereEmcPct)}.`
