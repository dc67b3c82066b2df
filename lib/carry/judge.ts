import { backHome } from './back-home'
import { bestCover, coverEdge, otherCovers } from './best-cover'
import type { CheckedPiece } from './carry-answer'
import type { CarryCheckInput, FullCheck } from './carry-check'
import { carryCheck, isReckoned, prepared, verdictCheck } from './check'
import { hangsOn } from './hangs-on'
import {
  type CarryAsked,
  carryCheckInput,
  type CarryMaterial,
  carryThereAndBack,
  type ToldCarryAsked,
} from './material'

export type JudgedPiece = Omit<CheckedPiece, 'id' | 'number' | 'title' | 'check'> & { check: FullCheck }

/** What the check says of one piece; `undefined` for a piece that was not loaded. */
export function checkPiece(material: CarryMaterial, asked: CarryAsked): FullCheck | undefined {
  const input = carryCheckInput(material, asked)
  return input === undefined ? undefined : carryCheck(input)
}

/**
 * As `checkPiece`, with what to do about it: the better covers, what the time hangs on, how long to wait at home. All of
 * it from one run of its wood, and other covers only where the one asked about is not fine.
 */
export function judgePiece(
  material: CarryMaterial,
  asked: CarryAsked | ToldCarryAsked,
): JudgedPiece | undefined {
  const input = carryThereAndBack(material, asked)
  return input === undefined ? undefined : judgeInput(input)
}

export function judgeInput(input: CarryCheckInput): JudgedPiece {
  const one = prepared(input)
  if (!isReckoned(one)) return { check: one, covers: [], bestCover: null, hangsOn: null, backHome: null }
  const covers = otherCovers(one)
  const check = verdictCheck(one)
  return {
    check,
    covers,
    bestCover: bestCover(coverEdge(one), covers, input.tub?.name),
    // Where it is fine there is time to spare: nothing hangs on it.
    hangsOn: check.verdict === 'fine' ? null : hangsOn(one),
    backHome: backHome(one) ?? null,
  }
}
