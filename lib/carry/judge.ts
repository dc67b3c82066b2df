import { carryCheck, carryCheckClosed } from './check'
import type { CarryCheckAnswer, PieceCheck } from './carry-check'
import { type CarryAsked, carryCheckInput, type CarryMaterial } from './material'

export interface JudgedPiece {
  check: PieceCheck
  /** The same carry in the cover that closes it best, where that betters the verdict. */
  closed: CarryCheckAnswer['pieces'][number]['bagged']
}

/** What the check says of one piece; `undefined` for a piece that was not loaded. */
export function checkPiece(material: CarryMaterial, asked: CarryAsked): PieceCheck | undefined {
  const input = carryCheckInput(material, asked)
  return input === undefined ? undefined : carryCheck(input)
}

/** As `checkPiece`, with the better cover beside it, which costs a second check. Page, API and the notices' worker all judge by this. */
export function judgePiece(material: CarryMaterial, asked: CarryAsked): JudgedPiece | undefined {
  const input = carryCheckInput(material, asked)
  if (input === undefined) return undefined
  const check = carryCheck(input)
  const closed = carryCheckClosed(input, check)
  return {
    check,
    closed: closed === undefined ? null : { verdict: closed.verdict, earlyAt: closed.earlyAt },
  }
}
