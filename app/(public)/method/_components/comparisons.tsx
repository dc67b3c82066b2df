import { Sheet } from '@/app/_components/ui/sheet'
import { measuredPoints } from '@/lib/method/agreement'
import {
  type ComparisonTable,
  detailTables,
  effectivenessTable,
  emcTables,
  summaryTable,
} from '@/lib/method/table-text'
import { Folded } from './folded'
import { titleOf } from './sections'
import { TextTable } from './text-table'

/** The program beside each published table, made by running it for this page. */
export function Comparisons() {
  const summary = summaryTable()
  const effectiveness = effectivenessTable()
  return (
    <Sheet id="tables" title={titleOf('tables')} className="scroll-mt-6">
      <div className="flex flex-col gap-6">
        <p className="max-w-words">
          Made by running the program when this page was opened. The printed values stand in its source beside
          their papers; nothing here is copied from its own results. Where a check value was worked out for
          the program and is printed nowhere, the table says so: agreement with it shows that the sum is done
          right, not that wood obeys it.
        </p>
        <TextTable caption={summary.title} columns={summary.columns} rows={summary.rows} />
        <div className="flex flex-col gap-2">
          <h3 className="font-semibold">EMC, cell by cell</h3>
          {emcTables().map((table) => (
            <FoldedTable key={table.id} table={table} />
          ))}
        </div>
        <div className="flex flex-col gap-2">
          <h3 className="font-semibold">The others, value by value</h3>
          {detailTables().map((table) => (
            <FoldedTable key={table.id} table={table} />
          ))}
        </div>
        <div className="flex flex-col gap-2">
          <h3 className="font-semibold">{effectiveness.title}</h3>
          <p className="max-w-words">
            How much of the water that bare pine takes up a finish keeps out. Three figures: the print, a film
            worked out from the first day that stays as it was, and the same counted by half, as it is
            reckoned with here.
          </p>
          <TextTable
            caption={effectiveness.title}
            columns={effectiveness.columns}
            rows={effectiveness.rows}
          />
        </div>
        <div className="flex flex-col gap-2">
          <h3 className="font-semibold">Beside what others measured</h3>
          <TextTable
            caption="Beside what others measured"
            columns={[{ header: 'What' }, { header: 'Measured' }, { header: 'Here' }, { header: 'Source' }]}
            rows={measuredPoints().map(({ what, measured, here, source }) => [what, measured, here, source])}
          />
        </div>
      </div>
    </Sheet>
  )
}

function FoldedTable({ table }: { table: ComparisonTable }) {
  return (
    <Folded title={table.title}>
      <TextTable caption={table.title} columns={table.columns} rows={table.rows} isNarrow />
    </Folded>
  )
}
