import { Sheet } from '@/app/_components/ui/sheet'
import { formatMass } from '@/lib/format/figures'
import type { Site, UnitSystem } from '@/lib/sites/site'

/** For those who may look and not change. */
export function PlaceFacts({ site, units }: { site: Site; units: UnitSystem }) {
  const facts = [
    ['Name', site.name],
    ['Time zone', site.timeZone.replaceAll('_', ' ')],
    ['Units', site.unitSystem === 'metric' ? 'metric' : 'imperial'],
    ['Quiet hours', site.quietFrom === site.quietTo ? 'none' : `${site.quietFrom} to ${site.quietTo}`],
    ['Lock-up', site.lockUpAt],
    ['Scale step', site.scaleStepG === null ? 'not told: 1 g is taken' : formatMass(site.scaleStepG, units)],
  ] as const
  return (
    <Sheet title="The place" id="place" aside="Only an owner changes it">
      <dl className="grid grid-cols-[8rem_minmax(0,1fr)] gap-x-4 gap-y-2">
        {facts.map(([name, value]) => (
          <div key={name} className="contents">
            <dt className="text-ink-soft">{name}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
    </Sheet>
  )
}
