'use client'

import { parseAsString, parseAsStringLiteral, useQueryStates } from 'nuqs'
import { pieceSortSchema, stageSchema } from '@/lib/pieces/piece'
import { type PieceFilters, pieceQuery } from '@/lib/pieces/list-address'

const parsers = {
  q: parseAsString.withDefault(''),
  stage: parseAsStringLiteral(stageSchema.options),
  room: parseAsString,
  out: parseAsStringLiteral(['yes', 'no'] as const),
  sort: parseAsStringLiteral(pieceSortSchema.options).withDefault('number'),
}

const isSort = (sort: string): sort is PieceFilters['sort'] => pieceSortSchema.safeParse(sort).success

/** What the list shows, kept in the address, so that it survives "back" and can be sent to somebody. */
export function usePieceFilters() {
  const [filters, setStates] = useQueryStates(parsers, { history: 'replace' })
  return {
    filters,
    query: pieceQuery(filters),
    isFiltered: filters.q !== '' || filters.stage !== null || filters.room !== null || filters.out !== null,
    setFilters: (change: Partial<Omit<PieceFilters, 'sort'>> & { sort?: string }) => {
      const { sort, ...rest } = change
      void setStates({ ...rest, ...(sort !== undefined && isSort(sort) ? { sort } : {}) })
    },
    clear: () => void setStates({ q: null, stage: null, room: null, out: null }),
  }
}
