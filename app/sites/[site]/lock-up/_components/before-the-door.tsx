import { Checkbox } from '@/app/_components/ui/checkbox'
import { Sheet } from '@/app/_components/ui/sheet'

/** What burns shops down at night. Ticked for oneself; nothing is stored and nothing waits for it. */
export function BeforeTheDoor() {
  return (
    <Sheet id="before-the-door" title="Before you close the door">
      <div className="divide-y divide-line">
        <Checkbox label="Oily rags laid flat outside, or under water" />
        <Checkbox label="Heater off, its lead out of the socket" />
      </div>
      <p className="mt-3 max-w-words text-label text-ink-soft">
        Rags with drying oil can catch fire by themselves in a heap or a bin (NFPA, HSE). Local rules come
        first.
      </p>
    </Sheet>
  )
}
