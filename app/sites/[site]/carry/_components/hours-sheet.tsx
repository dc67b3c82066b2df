'use client'

import { HourStripChart } from '@/app/_components/charts/hour-strip'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer } from '@/lib/carry/carry-answer'
import type { Reader } from '@/lib/sites/reader'

/** The coming hours of the room for the stay that is asked about, and the best of the week in words. */
export function HoursSheet({
  answer: { strip, bestHours, room },
  reader,
  now,
}: {
  answer: CarryCheckAnswer
  reader: Reader
  now: Date
}) {
  if (strip === null) return null
  return (
    <Sheet id="next-hours" ticks={strip.cells.length > 0}>
      <HourStripChart
        strip={strip}
        title={`${room.name}, next 48 hours`}
        roomName={room.name}
        timeZone={reader.timeZone}
        units={reader.units}
        now={now}
      />
      {bestHours ? <p className="mt-3 max-w-words font-semibold">{bestHours}</p> : null}
    </Sheet>
  )
}
