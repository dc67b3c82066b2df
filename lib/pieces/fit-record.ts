import { z } from 'zod'
import type { EventData } from './event'
import { fitGradeSchema, stageSchema } from './piece'

/** What a piece's record says of its fit. Kept with each final fit as it was before, so that it can be put back. */
export const fitFactsSchema = z.object({
  stage: stageSchema,
  fittedAt: z.iso.datetime().nullable(),
  fittedOn: z.iso.date().nullable(),
  fittedRoomId: z.int().nullable(),
  fitMcPct: z.number().nullable(),
  fitLidMcPct: z.number().nullable(),
  fitGrade: fitGradeSchema.nullable(),
  clearanceMm: z.number().nullable(),
  allowanceMm: z.number().nullable(),
  jointDiameterMm: z.number().nullable(),
})
export type FitFacts = z.infer<typeof fitFactsSchema>

/** A final fit or a re-true as it was entered. */
export type FitEntry = {
  /** Rises in the order in which they were entered. */
  readonly id: number
  readonly at: string
  /** The site's day of it. */
  readonly on: string
  readonly roomId: number | null
  readonly data: EventData
  /** The record before it was entered. */
  readonly before: FitFacts
  readonly isUndone: boolean
}

/** Later in time counts; of two at one moment, the one that was entered later. */
const byTime = (one: FitEntry, other: FitEntry): number =>
  Date.parse(one.at) - Date.parse(other.at) || one.id - other.id

/** Whether no other fit that stands was made after this one. */
export const isLatestFit = (entry: FitEntry, all: readonly FitEntry[]): boolean =>
  all.every((other) => other.isUndone || byTime(other, entry) <= 0)

/**
 * The record after a fit: the joint counts from there.
 * @param facts before it
 *
 * A grade or a clearance judged now takes the place of both, and of an allowance told for the fit before.
 */
export function afterFit(facts: FitFacts, { at, on, roomId, data }: FitEntry): FitFacts {
  const isFitTold = typeof data.fitGrade === 'string' || typeof data.clearanceMm === 'number'
  const isFollowed = data.basis === 'followed'
  return {
    stage: 'box',
    fittedAt: at,
    fittedOn: on,
    fittedRoomId: roomId,
    fitMcPct: isFollowed ? (data.ringMcPct ?? null) : null,
    fitLidMcPct: isFollowed ? (data.lidMcPct ?? null) : null,
    fitGrade: isFitTold ? (data.fitGrade ?? null) : facts.fitGrade,
    clearanceMm: isFitTold ? (data.clearanceMm ?? null) : facts.clearanceMm,
    allowanceMm: isFitTold ? null : facts.allowanceMm,
    jointDiameterMm: data.jointDiameterMm ?? facts.jointDiameterMm,
  }
}

/**
 * The record as the fits that stand make it, from what it was before the first of them was entered.
 * @returns undefined where no fit was ever entered
 */
export function fitOfEntries(entries: readonly FitEntry[]): FitFacts | undefined {
  const [first] = entries.toSorted((one, other) => one.id - other.id)
  if (first === undefined) return undefined
  return entries
    .filter((entry) => !entry.isUndone)
    .toSorted(byTime)
    .reduce(afterFit, first.before)
}
