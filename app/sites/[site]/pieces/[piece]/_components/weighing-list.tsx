'use client'

import { type ReactNode, useState } from 'react'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
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

/** The rest stands behind a press. */
const SHOWN_FIRST = 8

/** What it weighed, the newest first. A slip is undone and stays to be seen; it can be brought back. */
export function WeighingList({ reader, pieceId, page, now }: WeighingListProps) {
  const [isAll, setIsAll] = useState(false)
  const rows = weighingRows(page.items, page.rest, reader, now)
  const words = page.rest === null ? null : seriesWords(page.rest, reader, now)
  if (rows.length === 0) return <p className="text-ink-soft">It has not been weighed yet.</p>
  return (
    <>
      {words === null ? null : <p className="mb-3 max-w-words">{words}</p>}
      <WeighingTable
        rows={isAll ? rows : rows.slice(0, SHOWN_FIRST)}
        action={(row) => <UndoButton reader={reader} pieceId={pieceId} row={row} />}
      />
      {isAll || rows.length <= SHOWN_FIRST ? null : (
        <Button
          variant="link"
          onClick={() => {
            setIsAll(true)
          }}
        >
          All {rows.length} weighings
        </Button>
      )}
      {page.nextCursor === null || !isAll ? null : (
        <p className="mt-3 text-label text-ink-soft">The newest {page.items.length} are shown.</p>
      )}
    </>
  )
}

/** Figures under one another on a phone too; there the change is left out. */
function WeighingTable({
  rows,
  action,
}: {
  rows: readonly WeighingRow[]
  action: (row: WeighingRow) => ReactNode
}) {
  const hasMc = rows.some((row) => row.mc !== '')
  const head = 'border-b border-edge py-2 pr-3 text-label font-semibold text-ink-soft'
  const cell = 'border-b border-line py-1 pr-3 align-middle'
  return (
    <table className="w-full border-collapse text-left">
      <caption className="sr-only">Weighings</caption>
      <thead>
        <tr>
          <th scope="col" className={head}>
            When
          </th>
          <th scope="col" className={`${head} text-right`}>
            Mass
          </th>
          <th scope="col" className={`${head} text-right max-sm:hidden`}>
            Change
          </th>
          {hasMc ? (
            <th scope="col" className={`${head} text-right`}>
              % MC, about
            </th>
          ) : null}
          <th scope="col" className={`${head} pr-0 text-right`}>
            <span className="sr-only">Undo</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id}>
            <th scope="row" className={`${cell} font-normal`}>
              {row.when}
              {row.isEarlier ? <span className="text-ink-soft"> (earlier series)</span> : null}
              {row.note === '' ? null : <span className="block text-label text-ink-soft">{row.note}</span>}
            </th>
            <td className={`${cell} text-right`}>{row.isUndone ? <s>{row.mass}</s> : row.mass}</td>
            <td className={`${cell} text-right text-ink-soft max-sm:hidden`}>
              {row.isUndone ? 'undone' : row.change}
            </td>
            {hasMc ? <td className={`${cell} text-right`}>{row.mc}</td> : null}
            <td className={`${cell} pr-0 text-right`}>{action(row)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
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
