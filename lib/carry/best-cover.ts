import { leastUsefulStayMs } from '@/lib/notices/policy'
import type { Cover } from '@/lib/pieces/piece'
import type { AirFrom } from '@/lib/follow/wood-state'
import type { BestCover, CoverEdge } from './carry-answer'
import type { CarryCheckInput, Verdict } from './carry-check'
import { edgeOf, type Reckoned, reckoned } from './reckon'
import { verdictOf } from './verdict'

const HOUR_MS = 3_600_000

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }
/** The least trouble first: among covers that come to the same, this is the order of choice. */
/** How far past the stay other covers are looked at: the half hour that "fine" asks for and a little. */
const BEYOND_STAY_HOURS = 0.6
const COVERS: readonly Cover[] = ['open', 'lid-on', 'bagged', 'tub']

/** The verdict and the early edge of a carry that has been run through. */
export function coverEdge(one: Reckoned): CoverEdge {
  const { input } = one
  const { usedAtStart, earlyHours } = edgeOf(one)
  const earlyMs = earlyHours === undefined ? undefined : Math.round(earlyHours * HOUR_MS)
  return {
    cover: input.cover,
    verdict: verdictOf(usedAtStart, earlyMs, input.stayMinutes * 60_000),
    earlyAt: earlyMs === undefined ? null : new Date(input.startsAt + earlyMs).toISOString(),
  }
}

/**
 * The same air met in another cover. What was recorded stays as it was: only what is still to come can be covered.
 * In a tub with a sensor of its own the wood lies as in a room, in the tub's air as read.
 */
function coveredAirs(input: CarryCheckInput, airs: readonly AirFrom[], cover: Cover): AirFrom[] {
  const fromMs = Math.max(input.now, input.startsAt)
  return airs.map((air) => {
    if (air.at < fromMs) return air
    if (cover === 'tub' && input.tub !== undefined)
      return { ...air, emcPct: input.tub.emcPct, cover: 'closed' as const }
    return { ...air, cover }
  })
}

/**
 * How long the fit would keep in each cover that closes it better than the one asked about, the least trouble first;
 * looked at no further than the stay, so that what is fine has no edge.
 * @param one the carry as asked, run through
 * @returns empty for a carry that is fine as asked, or a piece that is past its allowance: there is nothing to better
 *
 * A bag and a tub as small rooms of their own (`coverDriftPerH`); a tub with a sensor of its own by its readings.
 */
export function otherCovers(one: Reckoned): CoverEdge[] {
  const { input, joint, start, there } = one
  const asked = coverEdge(one)
  if (asked.verdict === 'fine' || edgeOf(one).usedAtStart >= 1) return []
  return COVERS.slice(COVERS.indexOf(input.cover) + 1).map((cover) => {
    const airs = coveredAirs(input, input.airs, cover)
    const withinHours = input.stayMinutes / 60 + BEYOND_STAY_HOURS
    return coverEdge(reckoned({ ...input, airs, cover }, joint, start, there, withinHours))
  })
}

const edgeMs = ({ earlyAt }: CoverEdge): number => (earlyAt === null ? Infinity : new Date(earlyAt).getTime())

/**
 * The cover in which a carry does best, by its verdict and then by its early edge; null where none betters it.
 * @param asked in the cover asked about
 *
 * A later edge within the same verdict betters it from the least useful stay on: half an hour.
 */
export function bestCover(
  asked: CoverEdge,
  others: readonly CoverEdge[],
  tubName: string | undefined,
): BestCover | null {
  const [best] = others.toSorted(
    (a, b) => RANK[a.verdict] - RANK[b.verdict] || (a.verdict === 'fine' ? 0 : edgeMs(b) - edgeMs(a)) || 0,
  )
  if (best === undefined || best.verdict === 'leave') return null
  const isBetter =
    RANK[best.verdict] < RANK[asked.verdict] || edgeMs(best) - edgeMs(asked) >= leastUsefulStayMs
  if (!isBetter) return null
  return { ...best, readIn: best.cover === 'tub' ? (tubName ?? null) : null }
}
