'use client'

import { ChevronDown } from 'lucide-react'
import { KeepsByHour } from '@/app/_components/charts/keeps-by-hour'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer } from '@/lib/carry/carry-answer'
import { formatMoment } from '@/lib/format/times'
import type { Reader } from '@/lib/sites/reader'

type KeepsSheetProps = { answer: CarryCheckAnswer; reader: Reader; now: Date }

/** The coming hours of the least forgiving piece: in sight on a desk, folded on a phone. */
export function KeepsSheet({ answer, reader, now }: KeepsSheetProps) {
  const keeps = answer.keepsByHour
  if (keeps === null) return null
  const lit = keeps.hours.find((hour) => hour.ifLitAt !== null)?.ifLitAt
  const litAt = lit ? formatMoment(lit, reader.timeZone, now) : null
  const figure = (
    <>
      <KeepsByHour
        number={keeps.number}
        hours={keeps.hours}
        stayMinutes={answer.stayMinutes}
        betterAt={answer.betterHour?.startsAt ?? null}
        timeZone={reader.timeZone}
        now={now}
      />
      {litAt ? (
        <p className="mt-2 max-w-words text-label text-ink-soft">
          Hatched hours hold only if {answer.room.name} is lit, first at {litAt}. Never leave a heater alone
          with shavings or finishes.
        </p>
      ) : null}
    </>
  )
  return (
    <Sheet
      id="by-the-hour"
      ticks
      title={`How long ${keeps.number} keeps its fit, by the hour it goes out`}
      aside="the early edge"
    >
      <div className="max-sm:hidden">{figure}</div>
      <details className="group sm:hidden">
        <summary className="flex min-h-11 items-center justify-between font-semibold text-heart">
          By the hour it goes out
          <ChevronDown aria-hidden="true" size={20} strokeWidth={1.5} className="group-open:rotate-180" />
        </summary>
        {figure}
      </details>
    </Sheet>
  )
}
