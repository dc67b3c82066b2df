'use client'

import { type CellContext, createColumnHelper, tableFeatures, useTable } from '@tanstack/react-table'
import type { ReactNode } from 'react'
import { classNames } from './class-names'

const features = tableFeatures({})

export type Column<Row> = {
  id: string
  header: string
  cell: (row: Row) => ReactNode
  /** Figures stand under one another at the right. */
  align?: 'right'
  /** The word of the closed list of sorts, without its sign, when the server can sort by it. */
  sort?: string
  /** How it looks on a phone: the row's title, a line with its heading, or not at all. */
  phone?: 'title' | 'line' | 'bare' | 'hidden'
}

type DataTableProps<Row> = {
  caption: string
  captionHidden?: boolean
  columns: readonly Column<Row>[]
  rows: readonly Row[]
  rowKey: (row: Row) => string
  /** The sort in force, as the address has it: "number" or "-number". */
  sort?: string
  onSortChange?: (sort: string) => void
  /** Stands in place of the rows when there are none. */
  empty?: ReactNode
}

/** A table on a desk, a list on a phone; the same figures in the same order. */
export function DataTable<Row extends object>({
  caption,
  captionHidden = true,
  columns,
  rows,
  rowKey,
  sort,
  onSortChange,
  empty,
}: DataTableProps<Row>) {
  const helper = createColumnHelper<typeof features, Row>()
  const table = useTable({
    features,
    columns: columns.map((column) =>
      helper.display({
        id: column.id,
        header: column.header,
        cell: (context: CellContext<typeof features, Row>) => column.cell(context.row.original),
      }),
    ),
    data: rows,
    getRowId: rowKey,
  })
  const columnOf = (id: string) => columns.find((column) => column.id === id)

  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className="w-full overflow-x-auto max-sm:overflow-visible"
    >
      <table className="w-full border-collapse text-left max-sm:block">
        <caption className={captionHidden ? 'sr-only' : 'mb-2 text-left text-title font-semibold'}>
          {caption}
        </caption>
        <thead className="max-sm:sr-only">
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const column = columnOf(header.column.id)
                return (
                  <th
                    key={header.id}
                    scope="col"
                    aria-sort={ariaSort(column?.sort, sort)}
                    className={classNames(
                      'border-b border-edge py-2 pr-4 text-label font-semibold text-ink-soft last:pr-0',
                      column?.align === 'right' && 'text-right',
                    )}
                  >
                    {column?.sort && onSortChange ? (
                      <SortButton
                        name={column.header}
                        of={column.sort}
                        sort={sort}
                        onSortChange={onSortChange}
                      />
                    ) : (
                      <table.FlexRender header={header} />
                    )}
                  </th>
                )
              })}
            </tr>
          ))}
        </thead>
        <tbody className="max-sm:block">
          {table.getRowModel().rows.map((row) => (
            <tr key={row.id} className="border-b border-line max-sm:block max-sm:py-3">
              {row.getAllCells().map((cell) => {
                const column = columnOf(cell.column.id)
                return (
                  <td
                    key={cell.id}
                    className={classNames(
                      'py-3 pr-4 align-middle last:pr-0 max-sm:block max-sm:py-0.5 max-sm:pr-0',
                      column?.align === 'right' && 'sm:text-right',
                      column?.phone === 'title' && 'max-sm:font-semibold',
                      column?.phone === 'hidden' && 'max-sm:hidden',
                    )}
                  >
                    {column?.phone === 'line' ? (
                      <span aria-hidden="true" className="text-ink-soft sm:hidden">
                        {column.header}:{' '}
                      </span>
                    ) : null}
                    <table.FlexRender cell={cell} />
                  </td>
                )
              })}
            </tr>
          ))}
        </tbody>
      </table>
      {rows.length === 0 && empty ? <div className="py-6">{empty}</div> : null}
    </div>
  )
}

function ariaSort(own: string | undefined, sort: string | undefined) {
  if (!own) return undefined
  if (sort === own) return 'ascending'
  return sort === `-${own}` ? 'descending' : 'none'
}

type SortButtonProps = {
  name: string
  of: string
  sort: string | undefined
  onSortChange: (sort: string) => void
}

function SortButton({ name, of, sort, onSortChange }: SortButtonProps) {
  const state = ariaSort(of, sort)
  return (
    <button
      type="button"
      onClick={() => {
        onSortChange(state === 'ascending' ? `-${of}` : of)
      }}
      className="-my-2 inline-flex min-h-11 items-center gap-1 font-semibold underline decoration-dotted underline-offset-4"
    >
      {name}
      <span aria-hidden="true" className="w-3">
        {state === 'ascending' ? '↑' : state === 'descending' ? '↓' : ''}
      </span>
    </button>
  )
}
