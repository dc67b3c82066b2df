'use client'

import { HourStripChart } from '@/app/_components/charts/hour-strip'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Sheet } from '@/app/_components/ui/sheet'
import type { RoomForecastView } from '@/lib/forecast/forecast-view'
import { formatClock } from '@/lib/format/times'
import type { Reader } from '@/lib/sites/reader'

type ForecastSheetProps = { reader: Reader; initial: RoomForecastView; now: Date }

/** The room's next 48 hours: fit or not, in words, and how good such forecasts have been. */
export function ForecastSheet({ reader, initial, now }: ForecastSheetProps) {
  const { data: view = initial } = useSiteQuery<RoomForecastView>({
    site: reader.site,
    area: 'rooms',
    key: ['forecast', initial.room.id],
    path: `/rooms/${initial.room.id}/forecast`,
    initial,
  })
  return (
    <Sheet id="forecast" ticks>
      <HourStripChart
        strip={view.strip}
        title="The next 48 hours"
        roomName={view.room.name}
        timeZone={reader.timeZone}
        units={reader.units}
        now={now}
      />
      <div className="mt-4 grid gap-x-8 gap-y-4 border-t border-line pt-4 lg:grid-cols-2">
        <section>
          <h3 className="font-semibold">What is expected</h3>
          {view.words.map((words) => (
            <p key={words} className="mt-1">
              {words}
            </p>
          ))}
          {view.madeAt === null ? null : (
            <p className="mt-1 text-label text-ink-soft">
              Made at {formatClock(view.madeAt, reader.timeZone)}, anew each hour.
            </p>
          )}
        </section>
        <section>
          <h3 className="font-semibold">How good it has been, over the last {view.goodness.days} days</h3>
          <ul className="mt-1 flex flex-col gap-1">
            {view.goodness.words.map((words) => (
              <li key={words}>{words}</li>
            ))}
          </ul>
        </section>
      </div>
    </Sheet>
  )
}
