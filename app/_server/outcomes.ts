import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { type CarryRecord, findCarry } from '@/db/queries/carries'
import { followPieces } from '@/db/queries/follow-pieces'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { findPaces } from '@/db/queries/moisture'
import {
  findOutcome,
  insertOutcome,
  isOutcomeTold,
  listOutcomes,
  type OutcomeRecord,
  type OutcomeToInsert,
  updateOutcomeUndone,
} from '@/db/queries/outcomes'
import { listOutings, listPieceFacts } from '@/db/queries/piece-facts'
import type { PieceRecord } from '@/db/queries/pieces'
import { inTransaction } from '@/db/queries/transaction'
import { findStayOnRecord } from '@/db/queries/wood-at'
import type { Database } from '@/db/schema'
import { jointOfPiece } from '@/lib/carry/joint-defaults'
import { woodAt } from '@/lib/carry/material'
import { usedAtEnd, usedOf } from '@/lib/carry/used-at-end'
import type { NewOutcome, Outcome as LidOutcome, PieceOutcomes } from '@/lib/pieces/outcome'
import { ok } from '@/lib/result'
import { UNKNOWN_WOOD_CLASS } from '@/lib/wood/movement-class'
import { findOpenPiece, lockOpenPiece } from './open-piece'
import { fail, failField, notThere, type Outcome } from './problem'

const viewOf = (outcome: OutcomeRecord): LidOutcome => ({
  id: outcome.code,
  at: outcome.at.toISOString(),
  turned: outcome.turned,
  carryId: outcome.carryCode,
  note: outcome.note,
  by: outcome.by,
  isUndone: outcome.isUndone,
})

/** How a piece's lid turned, newest first, and what the site has learned of such wood. */
export async function getOutcomes(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
): Promise<Outcome<PieceOutcomes>> {
  const found = await findOpenPiece(db, member, pieceCode)
  if (!found.ok) return found
  const piece = found.value
  const [items, [row], paces] = await Promise.all([
    listOutcomes(db, member.siteId, piece.id),
    listPieceFacts(db, member.siteId, [piece.id]),
    findPaces(db, member.siteId),
  ])
  const movementClass = row?.movementClass ?? UNKNOWN_WOOD_CLASS
  const pace = paces.get(movementClass)
  return ok({
    items: items.map(viewOf),
    learned: pace === undefined ? null : { movementClass, factor: pace.factor, outcomes: pace.outcomes },
  })
}

/** How a lid turned: stored beside what the model had for it, so that the site's wood is learned from it. */
export async function createOutcome(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  input: NewOutcome,
  now: Date,
): Promise<Outcome<LidOutcome>> {
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    if (piece.stage !== 'box') return fail('not-possible', `${piece.number} has no lid that turns yet.`)
    const carry = await carryOf(trx, member, piece, input.carryId)
    if (!carry.ok) return carry
    const [row] = await listPieceFacts(trx, member.siteId, [piece.id])
    const code = await insertOutcome(
      trx,
      member.siteId,
      {
        pieceId: piece.id,
        carryId: carry.value?.id ?? null,
        turned: input.turned,
        movementClass: row?.movementClass ?? UNKNOWN_WOOD_CLASS,
        used: await usedThen(trx, member, piece, carry.value?.stay ?? null, now),
        note: input.note,
        userId: member.userId,
      },
      now,
    )
    return toldAnew(trx, member, piece, code, now)
  })
}

export async function setOutcomeUndone(
  db: Kysely<Database>,
  member: SiteMember,
  asked: { piece: string; outcome: string },
  isUndone: boolean,
  now: Date,
): Promise<Outcome<LidOutcome>> {
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, asked.piece)
    if (!found.ok) return found
    const piece = found.value
    const outcome = await findOutcome(trx, member.siteId, piece.id, asked.outcome)
    if (outcome === undefined) return notThere()
    if (outcome.isUndone !== isUndone) {
      const carry =
        outcome.carryCode === null ? undefined : await findCarry(trx, member.siteId, outcome.carryCode)
      if (!isUndone && carry && (await isOutcomeTold(trx, member.siteId, piece.id, carry.id)))
        return fail('already-done', 'It has been told anew since how the lid turned after that carry.')
      await updateOutcomeUndone(trx, member.siteId, outcome.id, isUndone ? now : null)
    }
    return toldAnew(trx, member, piece, outcome.code, now)
  })
}

async function toldAnew(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  code: string,
  now: Date,
): Promise<Outcome<LidOutcome>> {
  // Other pieces of such wood follow at their next turn; this one is being looked at.
  await followPieces(db, member, [piece.id], now)
  await notifySite(db, member.siteId, 'piece', piece.code)
  const outcome = await findOutcome(db, member.siteId, piece.id, code)
  return outcome === undefined ? notThere() : ok(viewOf(outcome))
}

interface Stay {
  from: Date
  until: Date
}

async function carryOf(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  carryCode: string | undefined,
): Promise<Outcome<{ id: number; stay: Stay } | null>> {
  if (carryCode === undefined) return ok(null)
  const carry = await findCarry(db, member.siteId, carryCode)
  const part = carry?.pieces.find(({ pieceId }) => pieceId === piece.id)
  if (carry === undefined || part === undefined) return notThere()
  const stay = stayOf(part)
  if (stay === undefined)
    return failField('not-possible', 'carryId', `${piece.number} has not come back from it`)
  if (await isOutcomeTold(db, member.siteId, piece.id, carry.id))
    return fail('already-done', 'It has been told already how the lid turned after that carry.')
  return ok({ id: carry.id, stay })
}

const stayOf = ({ outAt, backAt }: CarryRecord['pieces'][number]): Stay | undefined =>
  outAt === null || backAt === null ? undefined : { from: outAt, until: backAt }

const noAnswer: OutcomeToInsert['used'] = { slow: null, middle: null, fast: null }

/** What the model had used by then: at the end of the carry, so far for a piece that is out, else now at rest. */
async function usedThen(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  carryStay: Stay | null,
  now: Date,
): Promise<OutcomeToInsert['used']> {
  const material = await loadCarryMaterial(db, member, [piece.id], [], now)
  const own = material.pieces.get(piece.id)
  const joint = own && own.facts.woodKind === 'plain' ? jointOfPiece(own.facts) : undefined
  if (own === undefined || joint === undefined) return noAnswer
  const outAt = (await listOutings(db, member.siteId, [piece.id])).get(piece.id)
  const stay = carryStay ?? (outAt === undefined ? null : { from: outAt, until: now })
  if (stay === null) {
    // At rest its pace no longer tells: only the middle is kept.
    const wood = woodAt(material, own, now.getTime())
    return wood === null || own.cut === null
      ? noAnswer
      : { ...noAnswer, middle: usedOf(joint, wood, own.cut) }
  }
  // The joint was cut anew since: what the model has is of another one.
  if (piece.fittedAt !== null && piece.fittedAt > stay.until) return noAnswer
  const onRecord = await findStayOnRecord(db, member, piece.id, stay, now)
  if (onRecord === undefined) return noAnswer
  const span = { startsAt: stay.from.getTime(), endsAt: stay.until.getTime() }
  return usedAtEnd(joint, onRecord.start, onRecord.airs, span, own.cut)
}
