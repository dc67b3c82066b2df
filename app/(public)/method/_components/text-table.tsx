import { classNames } from '@/app/_components/ui/class-names'

type TextTableProps = {
  caption: string
  /** Heading of each column; `right` for figures that stand under one another. */
  columns: readonly { readonly header: string; readonly align?: 'right' }[]
  rows: readonly (readonly string[])[]
  /** Stays a table on a phone, for a few short figures in a row. */
  isNarrow?: boolean
}

/** A table of words and figures; on a phone its first column is each row's title, unless it is narrow enough as it is. */
export function TextTable({ caption, columns, rows, isNarrow = false }: TextTableProps) {
  return (
    <div role="region" aria-label={caption} tabIndex={0} className="w-full overflow-x-auto">
      <table
        className={classNames('w-full border-collapse text-left text-label', !isNarrow && 'max-sm:block')}
      >
        <caption className="sr-only">{caption}</caption>
        <thead className={isNarrow ? undefined : 'max-sm:sr-only'}>
          <tr>
            {columns.map(({ header, align }) => (
              <th
                key={header}
                scope="col"
                className={classNames(
                  'border-b border-edge py-2 pr-4 font-semibold text-ink-soft last:pr-0',
                  align === 'right' && 'text-right',
                )}
              >
                {header}
              </th>
            ))}
          </tr>
        </thead>
        <tbody className={isNarrow ? undefined : 'max-sm:block'}>
          {rows.map((cells) => (
            <tr
              key={cells.join('|')}
              className={classNames('border-b border-line', !isNarrow && 'max-sm:block max-sm:py-2')}
            >
              {cells.map((cell, n) => (
                <td
                  key={columns[n]?.header}
                  className={classNames(
                    'py-2 pr-4 align-top last:pr-0',
                    columns[n]?.align === 'right' && 'sm:text-right',
                    columns[n]?.align === 'right' && isNarrow && 'text-right',
                    !isNarrow && 'max-sm:block max-sm:py-0.5 max-sm:pr-0',
                    n === 0 && 'sm:min-w-36 max-sm:font-semibold',
                  )}
                >
                  {isNarrow || n === 0 ? null : (
                    <span aria-hidden="true" className="text-ink-soft sm:hidden">
                      {columns[n]?.header}:{' '}
                    </span>
                  )}
                  {cell}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
