import type { CarryMaterial } from '@/lib/carry/material'
import type { YearCarry } from './maker'
import type { YearScore } from './score'
import type { ShelfBox } from './shelf'
import { checkOf } from './site-notices'
import { goneAt, type TrueSite } from './truth-box'

/** What was told of carries, beside what is true of them. */

const MINUTE_MS = 60_000
const TOLD_WITHIN_MS = 30 * 24 * 60 * MINUTE_MS
export const WARNED_AHEAD_MS = 30 * MINUTE_MS

export interface Answer {
  verdict: 'fine' | 'keep-short' | 'leave' | 'none'
  /** When the grade would be gone in truth, had it gone now and stayed; null: not within 30 days. */
  goneAt: number | null
}

/** The check at the door of one box, and the truth of it. */
export function scoreCheck(
  { site, score }: { site: TrueSite; score: YearScore },
  material: CarryMaterial,
  box: ShelfBox,
  carry: YearCarry,
  shopId: number,
): Answer {
  const now = material.now.getTime()
  const stayMs = carry.askedMinutes * MINUTE_MS
  const truth = goneAt(box.truth, box.wood, box.trueCut, site, {
    room: 'shop',
    cover: carry.cover,
    untilMs: now + TOLD_WITHIN_MS,
  })
  const check = checkOf(material, box, shopId, {
    cover: carry.cover,
    stayMinutes: carry.askedMinutes,
    outAt: now,
    plannedAt: now,
  })
  if (check?.kind !== 'verdict') return { verdict: 'none', goneAt: truth }
  const holds = truth === null || truth > now + stayMs
  score.checks += 1
  if (check.verdict === 'leave') {
    score.leaves += 1
    if (holds) score.falseLeaves += 1
  }
  if (check.verdict === 'fine') {
    score.fines += 1
    if (!holds) score.falseFines += 1
  }
  if (truth !== null && truth > now) {
    const earlyMs = check.earlyAt === null ? Infinity : new Date(check.earlyAt).getTime()
    score.ratios.push((earlyMs - now) / (truth - now))
    if (check.earlyAt !== null) score.edges.told += 1
    if (check.earlyAt !== null && truth < earlyMs) score.edges.boundBefore += 1
  }
  return { verdict: check.verdict, goneAt: truth }
}

/** Whether a plan as it was asked for should have been warned of, and whether it was. */
export function scorePlan(score: YearScore, carry: YearCarry, answers: readonly Answer[], now: number): void {
  const endsAt = now + carry.askedMinutes * MINUTE_MS
  score.plannedCarries += 1
  if (carry.warnedAt !== undefined) score.warnedCarries += 1
  if (!answers.some((answer) => answer.goneAt !== null && answer.goneAt <= endsAt)) return
  if (carry.plannedAt - carry.madeAt < WARNED_AHEAD_MS) score.illAdvisedLate += 1
  else {
    score.illAdvised += 1
    if (carry.warnedAt !== undefined && carry.warnedAt <= carry.plannedAt - WARNED_AHEAD_MS) score.warned += 1
  }
}

/** Boxes that nobody remembered: whether the call came before the grade was gone. */
export function scoreForgotten({ forgotten }: YearScore, carry: YearCarry): void {
  carry.boxes.forEach((box, n) => {
    const gone = carry.goneAt[n] ?? null
    if (gone === null || gone > carry.ownBackAt) forgotten.notNeeded += 1
    else if (gone === carry.outAt) forgotten.goneBefore += 1
    else {
      forgotten.needed += 1
      if ((carry.calledAt.get(box.id) ?? Infinity) < gone) forgotten.calledIn += 1
    }
  })
}
