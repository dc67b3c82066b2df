import { formatFineLength, formatPoints } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import type { FitGrade, Grain, Piece, PieceDetail, Stage, WoodKind } from './piece'

export const stageWords: Readonly<Record<Stage, string>> = {
  box: 'Finished box',
  roughed: 'Roughed pair',
  blank: 'Blank',
}

export const fitGradeWords: Readonly<Record<FitGrade, { label: string; feel: string }>> = {
  suction: { label: 'Suction', feel: 'Suction: the lid sighs as it comes off and goes on.' },
  snap: { label: 'Snap', feel: 'Snap: it clicks over a bead and holds.' },
  snug: { label: 'Snug', feel: 'Snug: it lifts the base for a moment, then lets go.' },
  easy: { label: 'Easy', feel: 'Easy: it drops on and turns all the way round.' },
  loose: { label: 'Loose', feel: 'Loose: it can be heard to rattle.' },
  threaded: { label: 'Threaded', feel: 'Threaded: it screws on. Threads aren’t worked out.' },
}

export const woodKindWords: Readonly<Record<WoodKind, string>> = {
  plain: 'plain, straight-grained',
  stabilised: 'stabilised with resin',
  hybrid: 'part wood, part resin',
  wild: 'wild grain: burr, or near the pith',
}

export const grainWords: Readonly<Record<Grain, string>> = {
  'end-grain': 'end-grain: the grain runs from base to lid',
  'side-grain': 'side-grain: the grain runs across',
}

type ListedOut = Pick<Piece, 'number'>

/** The sentence over the list of pieces. `hasAny` says whether any piece is known at all. */
export function piecesHeadline(out: readonly ListedOut[], hasAny: boolean): TextPart[] {
  if (!hasAny) return say`No piece is known here yet. ${strong('Five answers')} make the first.`
  const numbers = out.map((piece) => piece.number)
  const last = numbers.at(-1)
  if (last === undefined) return say`Nothing is logged out.`
  if (numbers.length === 1) return say`${strong(last)} is logged out; nothing else is.`
  const told =
    numbers.length <= 4
      ? `${numbers.slice(0, -1).join(', ')} and ${last}`
      : `${numbers.slice(0, 3).join(', ')} and ${String(numbers.length - 3)} more`
  return say`${strong(told)} are logged out.`
}

type Moved = NonNullable<PieceDetail['mc']>

/**
 * How a lid should turn now, told as the trade tests it: by the quarter turn.
 * Swelling and drying close the joint alike at a quarter turn (Eq. 17 of the fit: tightest clearance falls with |dM|).
 * Thresholds in quarters of the allowance: common practice, no source.
 */
export function quarterTurnWords(mc: Pick<Moved, 'usedFraction'>): string {
  const used = mc.usedFraction
  if (used === null) return 'How much of its fit is used can’t be worked out.'
  if (used < 0.25) return 'It should turn as it did when it was fitted.'
  if (used < 0.6) return 'A quarter turn on it should be a little closer than when it was fitted.'
  if (used < 1) return 'A quarter turn on it should be close: tight, easy, tight, easy as it goes round.'
  return 'A quarter turn on it may bind. Line the grain up before you try it, and never force it.'
}

/** "a quarter of its allowance", in the words of the carry check: none, a quarter, half, all. */
export function usedWords(used: number): string {
  if (used < 0.13) return 'next to none of its allowance is used'
  if (used < 0.35) return 'about a quarter of its allowance is used'
  if (used < 0.65) return 'about half of its allowance is used'
  if (used < 0.9) return 'about three quarters of its allowance is used'
  if (used <= 1.05) return 'about all of its allowance is used'
  return 'more than its whole allowance is used'
}

/** The figures behind it: where the wood is against where its joint was cut, and what that takes from the clearance. */
export function movedWords(mc: Moved, units: UnitSystem): string {
  const change = mc.ringMcPct - mc.cutMcPct
  const moved =
    Math.abs(change) < 0.05
      ? 'It stands where its joint was cut'
      : `It stands ${formatPoints(change)} ${change > 0 ? 'damper' : 'drier'} than where its joint was cut`
  if (mc.lossMm === null || mc.allowanceMm === null) return `${moved}.`
  return (
    `${moved}, which takes ${lossWords(mc.lossMm, units)} ` +
    `of the ${formatFineLength(mc.allowanceMm, units)} that it may lose at a quarter turn.`
  )
}

/** Less than half of the least step told is not worth a figure. */
const TOLD_FROM_MM = 0.025

const lossWords = (lossMm: number, units: UnitSystem): string =>
  lossMm < TOLD_FROM_MM ? 'next to nothing' : `about ${formatFineLength(lossMm, units)}`
