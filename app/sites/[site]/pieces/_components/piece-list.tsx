'use client'

import { keepPreviousData, useInfiniteQuery } from '@tanstack/react-query'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { DataTable } from '@/app/_components/ui/data-table'
import { Pager } from '@/app/_components/ui/pager'
import { EmptyState, ErrorState, StaleState } from '@/app/_components/ui/states'
import type { Piece } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { pieceColumns } from './piece-columns'
import { PieceFilters } from './piece-filters'
import { usePieceFilters } from './use-piece-filters'

export type PiecePage = { items: Piece[]; nextCursor: string | null }

type PieceListProps = {
  reader: Reader
  initial: PiecePage
  initialQuery: string
  rooms: readonly { id: string; name: string }[]
}

export function PieceList({ reader, initial, initialQuery, rooms }: PieceListProps) {
  const { filters, setFilters, query, isFiltered, clear } = usePieceFilters()
  const pieces = useInfiniteQuery({
    queryKey: siteKey(reader.site, 'pieces', 'list', query),
    queryFn: ({ pageParam, signal }) =>
      apiFetch<PiecePage>(
        `/sites/${reader.site}/pieces?${query}${pageParam === null ? '' : `&cursor=${encodeURIComponent(pageParam)}`}`,
        { signal },
      ),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.nextCursor,
    initialData: query === initialQuery ? { pages: [initial], pageParams: [null] } : undefined,
    placeholderData: keepPreviousData,
  })
  const rows = pieces.data?.pages.flatMap((page) => page.items) ?? []

  return (
    <div className="flex flex-col gap-4">
      <PieceFilters filters={filters} onChange={setFilters} rooms={rooms} />
      {pieces.isError && rows.length > 0 ? (
        <StaleState>
          The pieces could not be fetched just now. Nothing is lost; these are the last known.
        </StaleState>
      ) : null}
      {pieces.isError && rows.length === 0 ? (
        <ErrorState
          title="The pieces could not be fetched."
          pending={pieces.isFetching}
          onRetry={() => void pieces.refetch()}
        />
      ) : (
        <DataTable
          caption="Pieces"
          columns={pieceColumns(reader)}
          rows={rows}
          rowKey={(piece) => piece.id}
          sort={filters.sort}
          onSortChange={(sort) => {
            setFilters({ sort })
          }}
          empty={
            pieces.isPending ? (
              <p className="text-ink-soft">Fetching the pieces.</p>
            ) : (
              <EmptyState
                title="No piece answers to that"
                actions={isFiltered ? <Button onClick={clear}>Show all pieces</Button> : undefined}
              />
            )
          }
        />
      )}
      {rows.length > 0 ? (
        <Pager
          shown={rows.length}
          hasMore={pieces.hasNextPage}
          onMore={() => void pieces.fetchNextPage()}
          pending={pieces.isFetchingNextPage}
          noun="pieces"
        />
      ) : null}
    </div>
  )
}
