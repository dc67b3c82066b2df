import 'server-only'
import type { Kysely } from 'kysely'
import { type CarryRecord, lockCarry } from '@/db/queries/carries'
import { updateCarry } from '@/db/queries/carry-changes'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { inTransaction } from '@/db/queries/transaction'
import { listWhateverCandidates } from '@/db/queries/whatever'
import type { Database } from '@/db/schema'
import type { Carry, CarryPutOff } from '@/lib/carry/carry'
import { betterHourOfPlan } from '@/lib/carry/put-off'
import { isCandidate, whateverJudged } from '@/lib/carry/whatever'
import { undoPutOffMs } from '@/lib/notices/policy'
import { getCarry } from './carries'
import { fail, failField, notThere, type Outcome } from './problem'

/** One press puts a plan off: to the hour that was asked for, or else to the best that the forecast knows of. */
export function putOffCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  asked: CarryPutOff,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    if (carry === undefined) return notThere()
    if (carry.state !== 'planned') return fail('already-done', 'Only a plan can be put off.')
    const seen = new Date(asked.from).getTime()
    // Pressed twice: whoever pressed still had the old hour on the screen.
    if (carry.plannedAt.getTime() !== seen) {
      if (carry.putOffFrom?.getTime() === seen) return getCarry(trx, member, carryCode, now)
      return fail('changed-meanwhile', 'Somebody changed this carry meanwhile. Look at it again.', {
        version: carry.version,
      })
    }
    const to = asked.to === undefined ? await betterHourOf(trx, member, carry, now) : new Date(asked.to)
    if (to === undefined)
      return fail(
        'not-possible',
        'The forecast knows of no better hour within two days. Choose one yourself.',
      )
    const refusal = refusedHour(carry, to, now)
    if (refusal !== undefined) return refusal
    await updateCarry(trx, member.siteId, carry.id, {
      plannedAt: to,
      putOffFrom: carry.plannedAt,
      putOffAt: now,
    })
    await notifySite(trx, member.siteId, 'carry', carry.code)
    return getCarry(trx, member, carryCode, now)
  })
}

const aheadMsMax = 366 * 24 * 3_600_000

function refusedHour(carry: CarryRecord, to: Date, now: Date) {
  if (to <= now) return failField('not-possible', 'to', 'that time has passed')
  if (to.getTime() === carry.plannedAt.getTime())
    return failField('not-possible', 'to', 'that is its hour already')
  if (to.getTime() > now.getTime() + aheadMsMax)
    return failField('not-possible', 'to', 'a year ahead at most')
  return undefined
}

async function betterHourOf(
  db: Kysely<Database>,
  member: SiteMember,
  carry: CarryRecord,
  now: Date,
): Promise<Date | undefined> {
  const candidates = carry.takesWhatever ? await listWhateverCandidates(db, member.siteId) : []
  const named = carry.pieces.map((piece) => piece.pieceId)
  const { roomId } = carry.toRoom
  const material = await loadCarryMaterial(db, member, [...named, ...candidates], [roomId], now)
  const stay = { toRoomId: roomId, stayMinutes: carry.stayMinutes, cover: carry.cover }
  const startsAt = carry.plannedAt < now ? now : carry.plannedAt
  const standing = candidates.filter((id) => isCandidate(material, id))
  const pieceIds = carry.takesWhatever
    ? whateverJudged(material, standing, { ...stay, startsAt }).pieces.map(({ pieceId }) => pieceId)
    : named
  return betterHourOfPlan(material, { ...stay, pieceIds }, startsAt)
}

/** Takes a put-off back, within ten minutes, as long as it has not been changed since. */
export function putBackCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    if (carry === undefined) return notThere()
    // Pressed twice, or never put off: it is as it is.
    if (carry.putOffFrom === null || carry.putOffAt === null) return getCarry(trx, member, carryCode, now)
    if (carry.state !== 'planned') return fail('already-done', 'It has gone, or was called off, since.')
    if (carry.putOffAt.getTime() <= now.getTime() - undoPutOffMs)
      return fail('not-possible', 'It was put off more than ten minutes ago. Change the plan instead.')
    await updateCarry(trx, member.siteId, carry.id, {
      plannedAt: carry.putOffFrom,
      putOffFrom: null,
      putOffAt: null,
    })
    await notifySite(trx, member.siteId, 'carry', carry.code)
    return getCarry(trx, member, carryCode, now)
  })
}
