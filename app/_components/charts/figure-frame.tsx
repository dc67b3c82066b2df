'use client'

import { type ReactNode, useId, useState } from 'react'

type FigureFrameProps = {
  title?: ReactNode
  aside?: ReactNode
  /** "Rule as a table": the same figures, one press away. */
  tableName: string
  table: ReactNode
  headingLevel?: 2 | 3
  /** A small figure in a row of others has its button below it. */
  isButtonBelow?: boolean
  className?: string
  children: ReactNode
}

/** A figure with its heading, and the same figures as a table behind one press. */
export function FigureFrame({
  title,
  aside,
  tableName,
  table,
  headingLevel = 2,
  isButtonBelow = false,
  className,
  children,
}: FigureFrameProps) {
  const [open, setOpen] = useState(false)
  const tableId = useId()
  const Heading = headingLevel === 2 ? 'h2' : 'h3'
  const button = (
    <button
      type="button"
      aria-expanded={open}
      aria-controls={tableId}
      onClick={() => {
        setOpen(!open)
      }}
      className="min-h-11 text-heart underline decoration-1 underline-offset-4 hover:decoration-2"
    >
      {tableName}
    </button>
  )
  return (
    <figure className={className}>
      {title || aside || !isButtonBelow ? (
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <div className="flex flex-wrap items-baseline gap-x-4">
            {title ? <Heading className="text-title font-semibold">{title}</Heading> : null}
            {aside ? <span className="text-ink-soft">{aside}</span> : null}
          </div>
          {isButtonBelow ? null : button}
        </div>
      ) : null}
      {children}
      {isButtonBelow ? button : null}
      <div
        id={tableId}
        hidden={!open}
        role="region"
        aria-label={tableName}
        className="mt-4 max-h-[28rem] overflow-auto"
        tabIndex={open ? 0 : undefined}
      >
        {open ? table : null}
      </div>
    </figure>
  )
}

type FigureTableProps = {
  caption: string
  heads: readonly string[]
  rows: readonly (readonly ReactNode[])[]
}

/** The figures of a figure. The first column names the row. */
export function FigureTable({ caption, heads, rows }: FigureTableProps) {
  return (
    <table className="w-full border-collapse text-left text-label">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          {heads.map((head) => (
            <th key={head} scope="col" className="border-b border-edge py-2 pr-4 font-semibold">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row, index) => (
          <tr key={index} className="border-b border-line">
            {row.map((cell, column) =>
              column === 0 ? (
                <th key={column} scope="row" className="py-2 pr-4 font-semibold">
                  {cell}
                </th>
              ) : (
                <td key={column} className="py-2 pr-4">
                  {cell}
                </td>
              ),
            )}
          </tr>
        ))}
      </tbody>
    </table>
  )
}
