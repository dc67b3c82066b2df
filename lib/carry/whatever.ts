import { formatCount } from '@/lib/format/figures'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { briefCheck } from './brief-check'
import type { PieceCheck, Verdict } from './carry-check'
import { checkPiece } from './judge'
import { type CarryAsked, carryCheckInput, type CarryMaterial } from './material'
import { namesOf } from './summary'

/** What a plan without named pieces is judged by. */
export interface WhateverJudged {
  /** Those that had better stay, the least forgiving first, then the one that gives the time for all the rest. */
  pieces: readonly { pieceId: number; check: PieceCheck }[]
  /** How many stand in their keep room and were looked at. */
  candidates: number
  /** How many had better stay; more than are named among `pieces` where there are many. */
  leaves: number
}

const RANK: Readonly<Record<Verdict, number>> = { leave: 0, 'keep-short': 1, fine: 2 }
/** More would not be read. */
const NAMED_LEAVES = 3

/** Whether a piece stands, finished and with a joint that can be judged, in the room that it is kept to match. */
export function isCandidate(material: CarryMaterial, pieceId: number): boolean {
  const piece = material.pieces.get(pieceId)
  const stay = piece?.stays.at(-1)
  return (
    piece?.facts.stage === 'box' &&
    stay !== undefined &&
    stay.toAt === null &&
    stay.roomId === piece.keepRoomId
  )
}

/**
 * Judges a plan for "whatever I take" by the least forgiving finished boxes that stand in their keep rooms.
 * @param candidateIds pieces that were loaded; those that stand elsewhere or can't be judged are passed over
 * @returns the ones that had better stay (three at most), then the least forgiving of the rest; empty where none is judged
 *
 * The boxes are put in order by what each would have used of its allowance at the end of the stay, in doubt.
 */
export function whateverJudged(
  material: CarryMaterial,
  candidateIds: readonly number[],
  asked: Omit<CarryAsked, 'pieceId'>,
): WhateverJudged {
  const candidates = candidateIds.filter((pieceId) => isCandidate(material, pieceId))
  const ranked = candidates
    .flatMap((pieceId) => {
      const input = carryCheckInput(material, { ...asked, pieceId })
      const brief = input && briefCheck(input)
      return brief === undefined ? [] : { pieceId, ...brief }
    })
    .toSorted(
      (a, b) =>
        RANK[a.verdict] - RANK[b.verdict] ||
        (a.earlyHours ?? Infinity) - (b.earlyHours ?? Infinity) ||
        b.usedAtEnd - a.usedAtEnd,
    )
  const leaves = ranked.filter(({ verdict }) => verdict === 'leave')
  const first = ranked.find(({ verdict }) => verdict !== 'leave')
  // Without fresh air nothing is ranked; any one of them then says why there is no verdict.
  const shown =
    ranked.length === 0
      ? candidates.slice(0, 1)
      : [...leaves.slice(0, NAMED_LEAVES), ...(first === undefined ? [] : [first])].map(
          ({ pieceId }) => pieceId,
        )
  return {
    pieces: shown.flatMap((pieceId) => {
      const check = checkPiece(material, { ...asked, pieceId })
      return check === undefined ? [] : { pieceId, check }
    }),
    candidates: candidates.length,
    leaves: leaves.length,
  }
}

export interface WhateverForWords {
  pieces: readonly { number: string; check: PieceCheck | null }[]
  candidates: number
  leaves: number
  stayMinutes: number
}

/** "Whatever you take: at most until 16:10, judged by 214; leave 219." */
export function whateverWords(judged: WhateverForWords, clock: { timeZone: string; now: Date }): string {
  const leave = judged.pieces.filter(({ check }) => check?.kind === 'verdict' && check.verdict === 'leave')
  const judge = judged.pieces.find(({ check }) => check?.kind === 'verdict' && check.verdict !== 'leave')
  const more = judged.leaves - leave.length
  const left = more > 0 ? `${namesOf(leave)} and ${formatCount(more, 'more', 'more')}` : namesOf(leave)
  if (judged.candidates === 0)
    return 'Whatever you take: no finished box stands in its keep room to judge by.'
  if (judge?.check?.kind === 'verdict') {
    const { check, number } = judge
    const by = `judged by ${number}, the least forgiving${leave.length > 0 ? ' of the rest' : ' that stands where it is kept'}`
    const until =
      check.verdict === 'fine' || check.earlyAt === null
        ? `the whole ${formatDuration(judged.stayMinutes)}`
        : `at most until ${formatMoment(check.earlyAt, clock.timeZone, clock.now)}`
    return `Whatever you take: ${until}, ${by}${leave.length > 0 ? `; leave ${left}` : ''}.`
  }
  if (leave.length > 0) return `Whatever you take had better stay: leave ${left}.`
  return 'Whatever you take: no verdict, as the air there is not known.'
}
