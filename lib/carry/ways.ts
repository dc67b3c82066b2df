import { leastUsefulStayMs } from '@/lib/notices/policy'
import type { Cover } from '@/lib/pieces/piece'
import type { CheckedPiece, CoverEdge } from './carry-answer'
import type { Verdict } from './carry-check'

/** The ways to make one carry, over all of its pieces together. */

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }
/** From the most open to the most shut. */
export const COVERS: readonly Cover[] = ['open', 'lid-on', 'bagged', 'tub']

type Asked = Pick<CheckedPiece, 'id' | 'check' | 'covers'>
export type WayPiece = { id: string; verdict: Verdict; earlyAt: string | null }

/**
 * What each piece would get in a cover.
 * @param asked the cover that was asked about
 * @returns those with a verdict; undefined where a cover was not worked out for one of them (a more open one)
 *
 * What is fine as asked is fine in any cover that is more shut.
 */
export function piecesInCover(pieces: readonly Asked[], asked: Cover, cover: Cover): WayPiece[] | undefined {
  const all: WayPiece[] = []
  for (const { id, check, covers } of pieces) {
    if (check.kind !== 'verdict') continue
    const { verdict, earlyAt } = check
    const own: CoverEdge | undefined =
      cover === asked ? { cover, verdict, earlyAt } : covers.find((one) => one.cover === cover)
    if (own !== undefined) all.push({ id, verdict: own.verdict, earlyAt: own.earlyAt })
    else if (COVERS.indexOf(cover) < COVERS.indexOf(asked)) return undefined
    else if (verdict === 'fine') all.push({ id, verdict, earlyAt: null })
    // Past its allowance already: no cover helps it.
    else all.push({ id, verdict, earlyAt })
  }
  return all
}

export const worstVerdict = (pieces: readonly { verdict: Verdict }[]): Verdict =>
  pieces.reduce<Verdict>((worst, { verdict }) => (RANK[verdict] > RANK[worst] ? verdict : worst), 'fine')

const firstEdgeMs = (pieces: readonly WayPiece[]): number =>
  Math.min(
    ...pieces.map(({ verdict, earlyAt }) =>
      verdict === 'fine' || earlyAt === null ? Infinity : new Date(earlyAt).getTime(),
    ),
  )
const sumOf = (pieces: readonly WayPiece[]): number =>
  pieces.reduce((sum, { verdict }) => sum + RANK[verdict], 0)

/**
 * The cover that all of them together do best in, by the verdicts and then by the first early edge.
 * @returns undefined where none betters the one asked about
 */
export function groupCover(
  pieces: readonly Asked[],
  asked: Cover,
): { cover: Cover; pieces: WayPiece[] } | undefined {
  const now = piecesInCover(pieces, asked, asked) ?? []
  const ways = COVERS.slice(COVERS.indexOf(asked) + 1).flatMap((cover) => {
    const own = piecesInCover(pieces, asked, cover)
    return own === undefined ? [] : { cover, pieces: own }
  })
  const [best] = ways.toSorted(
    (a, b) => sumOf(a.pieces) - sumOf(b.pieces) || firstEdgeMs(b.pieces) - firstEdgeMs(a.pieces) || 0,
  )
  if (best === undefined) return undefined
  const isBetter =
    sumOf(best.pieces) < sumOf(now) ||
    (sumOf(best.pieces) === sumOf(now) &&
      worstVerdict(best.pieces) !== 'leave' &&
      firstEdgeMs(best.pieces) - firstEdgeMs(now) >= leastUsefulStayMs)
  return isBetter ? best : undefined
}
