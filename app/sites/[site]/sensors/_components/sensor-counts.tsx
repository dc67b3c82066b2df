import { formatCount } from '@/lib/format/figures'
import { countWords } from '@/lib/sensors/wording'

/** Today's readings that were not simply kept, each with what became of it. */
export function SensorCounts({ counts }: { counts: Readonly<Record<string, number>> }) {
  const told = Object.entries(countWords).filter(([kind]) => (counts[kind] ?? 0) > 0)
  if (told.length === 0)
    return <p className="text-ink-soft">Nothing out of the way: every reading was kept as it came.</p>
  return (
    <ul className="flex flex-col gap-1">
      {told.map(([kind, words]) => (
        <li key={kind}>
          <strong>{formatCount(counts[kind] ?? 0, 'reading')}</strong> {words}
        </li>
      ))}
    </ul>
  )
}
