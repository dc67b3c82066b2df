import { Sheet } from '@/app/_components/ui/sheet'
import { type DefaultGroup, modelDefaults } from '@/lib/method/defaults'
import { productThresholds } from '@/lib/method/thresholds'
import { titleOf } from './sections'
import { TextTable } from './text-table'

/** What is taken where nothing was told, and when the product speaks. */
export function DefaultsTables() {
  return (
    <Sheet id="defaults" title={titleOf('defaults')} className="scroll-mt-6">
      <div className="flex flex-col gap-6">
        <p className="max-w-words">
          What is taken where nobody has said otherwise, and when the product speaks. Each figure is read from
          the program as it runs. A guess is called one; whatever a maker or a site knows better replaces it.
        </p>
        {[...modelDefaults, ...productThresholds].map((group) => (
          <Group key={group.id} group={group} />
        ))}
      </div>
    </Sheet>
  )
}

function Group({ group }: { group: DefaultGroup }) {
  return (
    <div className="flex flex-col gap-2">
      <h3 id={group.id} className="scroll-mt-6 font-semibold">
        {group.title}
      </h3>
      <TextTable
        caption={group.title}
        columns={[{ header: 'What' }, { header: 'Figure' }, { header: 'Status' }, { header: 'Why' }]}
        rows={group.rows.map(({ what, value, status, why }) => [what, value, status, why])}
      />
    </div>
  )
}
