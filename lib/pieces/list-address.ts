import { pieceSortSchema, stageSchema } from './piece'
import type { z } from 'zod'

/** What the list of pieces is narrowed to, as it stands in the page's address. */
export interface PieceFilters {
  q: string
  stage: z.infer<typeof stageSchema> | null
  room: string | null
  out: 'yes' | 'no' | null
  sort: z.infer<typeof pieceSortSchema>
}

export const piecesPerPage = 50

/** The same filters as the API takes them. Always in one order, so that equal filters give equal text. */
export function pieceQuery(filters: PieceFilters): string {
  const query = new URLSearchParams({ limit: String(piecesPerPage), sort: filters.sort })
  const search = filters.q.trim().slice(0, 60)
  if (search !== '') query.set('q', search)
  if (filters.stage !== null) query.set('stage', filters.stage)
  if (filters.room !== null) query.set('room', filters.room)
  if (filters.out !== null) query.set('out', filters.out)
  return query.toString()
}

/** The filters in a page's address. What isn't one of ours counts as not given: a page has no use for an error there. */
export function pieceFiltersOf(given: Readonly<Record<string, string | string[] | undefined>>): PieceFilters {
  const one = (key: string) => (typeof given[key] === 'string' ? given[key] : undefined)
  const stage = stageSchema.safeParse(one('stage'))
  const sort = pieceSortSchema.safeParse(one('sort'))
  const out = one('out')
  return {
    q: one('q') ?? '',
    stage: stage.success ? stage.data : null,
    room: one('room') ?? null,
    out: out === 'yes' || out === 'no' ? out : null,
    sort: sort.success ? sort.data : 'number',
  }
}
