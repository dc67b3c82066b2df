import { Sheet } from '@/app/_components/ui/sheet'
import type { Session } from '@/lib/carry/carry-answer'
import { formatMoment } from '@/lib/format/times'
import type { Reader } from '@/lib/sites/reader'

/** For several pieces at once: what is worked first, and when to stop. */
export function SessionSheet({ session, reader, now }: { session: Session; reader: Reader; now: Date }) {
  return (
    <Sheet id="session" title="In this order" aside="the least forgiving first">
      <p className="mb-3 max-w-words">{session.words}</p>
      <ol>
        {session.order.map((piece, index) => (
          <li
            key={piece.id}
            className="flex flex-wrap items-baseline gap-x-4 border-b border-line py-2 last:border-b-0"
          >
            <span aria-hidden="true" className="w-5 text-ink-soft tabular-nums">
              {index + 1}
            </span>
            <strong className="min-w-12">{piece.number}</strong>
            <span>
              work it, and take it back by <strong>{formatMoment(piece.backBy, reader.timeZone, now)}</strong>
            </span>
          </li>
        ))}
      </ol>
    </Sheet>
  )
}
