'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Mark } from '@/app/_components/ui/mark'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { formatClockSeconds } from '@/lib/format/times'
import type { SensorDetail } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'

type Heard = { at: string; temperatureC: number; humidityPct: number; emcPct: number; heardAt: string }

/** Waits for the sensor's first word, and then says what it said; later readings go on beside it. */
export function FirstReading({ reader, sensorId }: { reader: Reader; sensorId: string }) {
  const { data: sensor } = useSiteQuery<SensorDetail>({
    site: reader.site,
    area: 'sensors',
    key: ['one', sensorId],
    path: `/sensors/${sensorId}`,
  })
  const [heard, setHeard] = useState<readonly Heard[]>([])
  const last = sensor?.last
  if (last && sensor.heardAt && heard.at(-1)?.heardAt !== sensor.heardAt) {
    setHeard([...heard.slice(-19), { ...last, heardAt: sensor.heardAt }])
  }
  const first = heard[0]

  return (
    <div className="flex flex-col gap-3 text-[18px] leading-7 sm:text-[19px]">
      {first === undefined ? (
        <p role="status" className="text-ink-soft">
          Waiting to hear from it. This page shows its first reading by itself.
        </p>
      ) : (
        <>
          <p role="status">
            It was first heard at <strong>{formatClockSeconds(first.heardAt, reader.timeZone)}</strong> and
            says{' '}
            <strong>
              {formatTemperature(first.temperatureC, reader.units)}, {formatHumidity(first.humidityPct)}
            </strong>
            , which is <strong>{formatEmc(first.emcPct)}</strong>; <Looks sensor={sensor} />
          </p>
          <p className="text-label text-ink-soft">
            That is the moisture content at which wood left in this air would end.
            {heard.length > 1
              ? ` ${String(heard.length)} readings since this page was opened, the last at ${formatClockSeconds(heard.at(-1)?.heardAt ?? first.heardAt, reader.timeZone)}.`
              : ''}
          </p>
        </>
      )}
    </div>
  )
}

function Looks({ sensor }: { sensor: SensorDetail | undefined }) {
  if (sensor?.clock === 'not-set' || sensor?.clock === 'ahead') {
    return (
      <span className="font-semibold text-warn">
        <Mark kind="silent" className="translate-y-[3px]" />{' '}
        {sensor.clock === 'ahead' ? 'its clock is ahead: set it.' : 'its clock is not set: set it.'}
      </span>
    )
  }
  return (
    <span className="font-semibold text-good">
      <Mark kind="fine" className="translate-y-[3px]" /> it looks right.
    </span>
  )
}
