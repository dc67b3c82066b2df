'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { formatFullMoment, formatMoment } from '@/lib/format/times'
import type { Refused } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'

type RefusedList = { items: Refused[]; nextCursor: string | null }
type RefusedMessagesProps = {
  reader: Reader
  /** Of one sensor; without it, of the whole site, each with the sensor's name. */
  sensorId?: string
  initial: RefusedList
}

/** What could not be used, kept with its reason: nothing that a sensor sends vanishes without a word. */
export function RefusedMessages({ reader, sensorId, initial }: RefusedMessagesProps) {
  const { data = initial } = useSiteQuery<RefusedList>({
    site: reader.site,
    area: 'refused',
    key: [sensorId ?? 'all'],
    path: `/refused?${sensorId === undefined ? '' : `sensor=${sensorId}&`}limit=20`,
    initial,
  })
  if (data.items.length === 0) return null
  return (
    <section aria-labelledby="refused-title" className={sensorId === undefined ? undefined : 'mt-5'}>
      <h3 id="refused-title" className={sensorId === undefined ? 'sr-only' : 'font-semibold'}>
        Messages that could not be used{data.nextCursor === null ? '' : ', the latest 20'}
      </h3>
      <ul className="mt-1 flex flex-col divide-y divide-line">
        {data.items.map((refused) => (
          <li key={refused.id} className="flex flex-col gap-1 py-3">
            <p>
              <time
                dateTime={refused.at}
                title={formatFullMoment(refused.at, reader.timeZone)}
                className="text-ink-soft"
              >
                {formatMoment(refused.at, reader.timeZone, new Date(reader.at))}
              </time>{' '}
              {sensorId === undefined && refused.sensor ? <strong>{refused.sensor.name}: </strong> : null}
              {refused.words}
            </p>
            <p className="text-label break-all text-ink-soft">
              {refused.field ? `In ${refused.field}: ` : ''}
              {refused.detail || `${String(refused.sizeBytes)} bytes to ${refused.topic}`}
            </p>
          </li>
        ))}
      </ul>
    </section>
  )
}
