'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Age } from '@/app/_components/ui/age'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Caution } from '@/app/_components/ui/caution'
import { type Column, DataTable } from '@/app/_components/ui/data-table'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState, StaleState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import type { Refused, Sensor } from '@/lib/sensors/sensor'
import { coinCellCaution, sensorsHeadline } from '@/lib/sensors/wording'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { RefusedMessages } from './refused-messages'
import { SensorState } from './sensor-state'

const shows = ['all', 'trouble', 'retired'] as const
type Show = (typeof shows)[number]
const isShow = (value: string): value is Show => shows.some((show) => show === value)

type SensorList = { items: Sensor[] }

type SensorsViewProps = {
  reader: Reader
  initial: SensorList
  refused: { items: Refused[]; nextCursor: string | null }
}

export function SensorsView({ reader, initial, refused }: SensorsViewProps) {
  const { data, isError } = useSiteQuery<SensorList>({
    site: reader.site,
    area: 'sensors',
    key: ['list'],
    path: '/sensors',
    initial,
  })
  const [show, setShow] = useQueryState('show', parseAsStringLiteral(shows).withDefault('all'))
  const devices = (data ?? initial).items.filter((sensor) => sensor.kind === 'device')
  const rows = devices.filter((sensor) => isShown(sensor, show))
  const mayChange = may(reader.role, 'sensors:change')

  const add = (
    <ButtonLink href={`/sites/${reader.site}/sensors/add`} variant="filled">
      Add a sensor
    </ButtonLink>
  )
  return (
    <>
      <PageSentence parts={sensorsHeadline(devices)} />
      {isError ? (
        <StaleState>
          The sensors could not be fetched just now. Nothing is lost; these are the last known.
        </StaleState>
      ) : null}
      {devices.length === 0 ? (
        <Sheet>
          <EmptyState title="No sensor yet" actions={mayChange ? add : undefined}>
            A sensor measures temperature and humidity and sends them here. Until there is one, type readings
            in on a room’s page.
          </EmptyState>
        </Sheet>
      ) : (
        <Sheet title="Sensors" id="sensors" action={mayChange ? add : undefined}>
          <SegmentedTabs
            label="Which sensors to show"
            value={show}
            onValueChange={(value) => {
              if (isShow(value)) void setShow(value)
            }}
            segments={[
              { value: 'all', label: 'In use' },
              { value: 'trouble', label: 'Need a look' },
              { value: 'retired', label: 'Retired' },
            ]}
          >
            <div className="mt-4">
              <DataTable
                caption="Sensors"
                columns={columnsFor(reader)}
                rows={rows}
                rowKey={(sensor) => sensor.id}
                empty={
                  <p className="text-ink-soft">
                    {show === 'retired' ? 'No sensor has been retired.' : 'None needs a look just now.'}
                  </p>
                }
              />
            </div>
          </SegmentedTabs>
        </Sheet>
      )}
      {refused.items.length > 0 ? (
        <Sheet title="Messages that could not be used" id="refused" aside="The latest 20 at most">
          <RefusedMessages reader={reader} initial={refused} />
        </Sheet>
      ) : null}
      <div className="px-4 sm:px-0">
        <Caution>{coinCellCaution}</Caution>
      </div>
    </>
  )
}

function isShown(sensor: Sensor, show: Show): boolean {
  if (sensor.state === 'retired') return show === 'retired'
  if (show === 'retired') return false
  const isWeak = sensor.batteryPct !== null && sensor.batteryPct < lowBatteryPct
  return (
    show === 'all' ||
    sensor.state !== 'alive' ||
    sensor.clock !== 'right' ||
    sensor.refusedToday > 0 ||
    isWeak
  )
}

/** Common practice, no source: most sensors grow unreliable in the last fifth of a coin cell. */
const lowBatteryPct = 20

function columnsFor({ site, timeZone, units, at }: Reader): Column<Sensor>[] {
  return [
    {
      id: 'name',
      header: 'Sensor',
      phone: 'title',
      cell: (sensor) => (
        <TextLink
          href={`/sites/${site}/sensors/${sensor.id}`}
          className="inline-flex min-h-11 items-center font-semibold"
        >
          {sensor.name}
        </TextLink>
      ),
    },
    { id: 'state', header: 'State', phone: 'bare', cell: (sensor) => <SensorState state={sensor.state} /> },
    {
      id: 'room',
      header: 'Room',
      phone: 'bare',
      cell: (sensor) =>
        sensor.room ? (
          <span className="inline-flex items-center gap-2">
            <RoomMark mark={sensor.room.mark} />
            <span>
              {sensor.room.name}
              {sensor.spot ? <span className="text-ink-soft">, {sensor.spot}</span> : null}
            </span>
          </span>
        ) : (
          <span className="text-ink-soft">in no room</span>
        ),
    },
    {
      id: 'reading',
      header: 'Last reading',
      phone: 'bare',
      cell: (sensor) =>
        sensor.last ? (
          <span>
            {formatTemperature(sensor.last.temperatureC, units)}, {formatHumidity(sensor.last.humidityPct)},{' '}
            <strong className="whitespace-nowrap">{formatEmc(sensor.last.emcPct)}</strong>
          </span>
        ) : (
          <span className="text-ink-soft">none yet</span>
        ),
    },
    {
      id: 'heard',
      header: 'Last heard',
      phone: 'line',
      cell: (sensor) =>
        sensor.heardAt ? (
          <span className="whitespace-nowrap">
            <Age at={sensor.heardAt} timeZone={timeZone} now={at} />
          </span>
        ) : (
          <span className="text-ink-soft">never</span>
        ),
    },
    {
      id: 'battery',
      header: 'Battery',
      align: 'right',
      phone: 'line',
      cell: (sensor) => <Battery pct={sensor.batteryPct} />,
    },
  ]
}

function Battery({ pct }: { pct: number | null }) {
  if (pct === null) return <span className="text-ink-soft">not told</span>
  return (
    <span className={pct < lowBatteryPct ? 'font-semibold text-warn' : undefined}>
      {`${String(Math.round(pct))}\u00a0%\u00a0left`}
    </span>
  )
}
