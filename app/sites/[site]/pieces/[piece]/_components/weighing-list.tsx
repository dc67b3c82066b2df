'use client'

import type { ReactNode } from 'react'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { type Column, DataTable } from '@/app/_components/ui/data-table'
import { useAction } from '@/app/_components/use-action'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { seriesWords, type WeighingRow, weighingRows } from './weighing-rows'

type WeighingListProps = {
  reader: Reader
  pieceId: string
  page: WeighingsPage
  now: Date
}

/** What it weighed, the newest first. A slip is undone and stays to be seen; it can be brought back. */
export function WeighingList({ reader, pieceId, page, now }: WeighingListProps) {
  const rows = weighingRows(page.items, page.rest, reader, now)
  const words = page.rest === null ? null : seriesWords(page.rest, reader, now)
  if (rows.length === 0) return <p className="text-ink-soft">It has not been weighed yet.</p>
  return (
    <>
      {words === null ? null : <p className="mb-3 max-w-words">{words}</p>}
      <DataTable
        caption="Weighings"
        columns={columnsOf(rows, (row) => (
          <UndoButton reader={reader} pieceId={pieceId} row={row} />
        ))}
        rows={rows}
        rowKey={(row) => row.id}
      />
      {page.nextCursor === null ? null : (
        <p className="mt-3 text-label text-ink-soft">The newest {page.items.length} are shown.</p>
      )}
    </>
  )
}

const struck = (row: WeighingRow, words: string) => (row.isUndone ? <s>{words}</s> : words)

function columnsOf(
  rows: readonly WeighingRow[],
  action: (row: WeighingRow) => ReactNode,
): Column<WeighingRow>[] {
  const columns: Column<WeighingRow>[] = [
    {
      id: 'when',
      header: 'When',
      cell: (row) => (
        <>
          {row.when}
          {row.isEarlier ? <span className="text-ink-soft"> (earlier series)</span> : null}
          {row.note === '' ? null : <span className="block text-label text-ink-soft">{row.note}</span>}
        </>
      ),
      phone: 'title',
    },
    { id: 'mass', header: 'Mass', cell: (row) => struck(row, row.mass), align: 'right', phone: 'line' },
    {
      id: 'change',
      header: 'Change',
      cell: (row) => <span className="text-ink-soft">{row.isUndone ? 'undone' : row.change}</span>,
      align: 'right',
      phone: 'bare',
    },
  ]
  if (rows.some((row) => row.mc !== ''))
    columns.push({
      id: 'mc',
      header: '% MC, about',
      cell: (row) => row.mc,
      align: 'right',
      phone: 'line',
    })
  columns.push({ id: 'undo', header: 'Undo', cell: action, align: 'right', phone: 'bare' })
  return columns
}

function UndoButton({ reader, pieceId, row }: { reader: Reader; pieceId: string; row: WeighingRow }) {
  const path = `/sites/${reader.site}/pieces/${pieceId}/weighings/${row.id}`
  const change = useAction<{ isUndone: boolean }, unknown>({
    run: ({ isUndone }) =>
      isUndone ? apiFetch(path, { method: 'DELETE' }) : apiFetch(`${path}/restore`, { method: 'POST' }),
    invalidates: [siteKey(reader.site, 'pieces'), siteKey(reader.site, 'now')],
    done: (_answer, { isUndone }) => (isUndone ? `${row.mass} undone` : `${row.mass} counts again`),
  })
  return (
    <Button
      variant="link"
      pending={change.pending}
      aria-label={`${row.isUndone ? 'Bring back' : 'Undo'} ${row.mass} of ${row.when}`}
      onClick={() => {
        change.act({ isUndone: !row.isUndone })
      }}
    >
      {row.isUndone ? 'Bring back' : 'Undo'}
    </Button>
  )
}
