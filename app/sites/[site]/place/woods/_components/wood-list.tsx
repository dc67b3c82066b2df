'use client'

import { Button } from '@/app/_components/ui/button'
import { DataTable } from '@/app/_components/ui/data-table'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import type { Reader } from '@/lib/sites/reader'
import { findWoods } from '@/lib/wood/find-woods'
import type { Wood } from '@/lib/wood/wood'
import { perPointWords } from '@/lib/wood/wood-words'
import { woodColumns } from './wood-columns'

type WoodListProps = {
  reader: Reader
  woods: readonly Wood[]
  query: string
  onQuery: (query: string) => void
  /** Absent for those who may look and not change. */
  onPutAway: ((wood: Wood) => void) | undefined
}

export function WoodList({ reader, woods, query, onQuery, onPutAway }: WoodListProps) {
  const found = findWoods(query, woods)
  return (
    <Sheet>
      <form
        role="search"
        aria-label="Find a wood"
        className="mb-4 max-w-[28rem]"
        onSubmit={(event) => {
          event.preventDefault()
        }}
      >
        <Field label="Common or Latin name, or a part of it">
          <Input
            type="search"
            maxLength={60}
            value={query}
            onChange={(event) => {
              onQuery(event.target.value)
            }}
          />
        </Field>
      </form>
      <p role="status" className="mb-2 text-label text-ink-soft">
        {query === ''
          ? perPointWords[reader.units]
          : found.woods.length === 1
            ? 'One wood answers to that.'
            : `${String(found.woods.length)} woods answer to that.`}
        {found.suggestedKind === 'wild'
          ? ' A burr, burl or crotch has wild grain and moves its own way: on a piece, count it as wild grain.'
          : ''}
      </p>
      <DataTable
        caption="Woods"
        columns={woodColumns(reader, onPutAway)}
        rows={found.woods}
        rowKey={(wood) => wood.slug}
        empty={
          <EmptyState
            title="No wood answers to that"
            actions={
              <Button
                onClick={() => {
                  onQuery('')
                }}
              >
                Show all woods
              </Button>
            }
          />
        }
      />
    </Sheet>
  )
}
