'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Age } from '@/app/_components/ui/age'
import { Caution } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { Sheet } from '@/app/_components/ui/sheet'
import { StaleState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import type { Refused, SensorDetail } from '@/lib/sensors/sensor'
import { coinCellCaution, publishLine, sensorSentence } from '@/lib/sensors/wording'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { CopyText } from './copy-text'
import { MoveSensor } from './move-sensor'
import { RefusedMessages } from './refused-messages'
import { RenameSensor } from './rename-sensor'
import { RenewSecret } from './renew-secret'
import { RetireSensor } from './retire-sensor'
import { SensorCounts } from './sensor-counts'
import { SensorState } from './sensor-state'

type SensorViewProps = {
  reader: Reader
  initial: SensorDetail
  rooms: readonly { id: string; name: string }[]
  refused: { items: Refused[]; nextCursor: string | null }
}

export function SensorView({ reader, initial, rooms, refused }: SensorViewProps) {
  const { data, isError } = useSiteQuery<SensorDetail>({
    site: reader.site,
    area: 'sensors',
    key: ['one', initial.id],
    path: `/sensors/${initial.id}`,
    initial,
  })
  const sensor = data ?? initial
  const { timeZone, units, at, site } = reader
  const mayChange = may(reader.role, 'sensors:change') && sensor.state !== 'retired'

  return (
    <>
      <PageSentence
        parts={sensorSentence(sensor, timeZone, new Date(at))}
        above={
          <>
            <TextLink href={`/sites/${site}/sensors`}>Sensors</TextLink>
            <SensorState state={sensor.state} />
          </>
        }
      />
      {isError ? (
        <StaleState>
          This sensor could not be fetched just now. Nothing is lost; these are the last known.
        </StaleState>
      ) : null}

      <Sheet
        title="As it stands"
        id="standing"
        action={mayChange ? <RenameSensor reader={reader} sensor={sensor} /> : null}
      >
        <dl className="grid grid-cols-1 gap-x-8 gap-y-3 sm:grid-cols-2">
          <Fact name="Last reading">
            {sensor.last ? (
              <>
                {formatTemperature(sensor.last.temperatureC, units)},{' '}
                {formatHumidity(sensor.last.humidityPct)}, <strong>{formatEmc(sensor.last.emcPct)}</strong>,
                measured {formatMoment(sensor.last.at, timeZone, new Date(at))}
              </>
            ) : (
              'none yet'
            )}
          </Fact>
          <Fact name="Last heard">
            {sensor.heardAt ? <Age at={sensor.heardAt} timeZone={timeZone} now={at} /> : 'never'}
          </Fact>
          <Fact name="Usual gap between readings">
            {sensor.usualGapS === null ? 'not known yet' : gapWords(sensor.usualGapS)}
          </Fact>
          <Fact name="Battery">
            {sensor.batteryPct === null ? 'not told' : `${String(Math.round(sensor.batteryPct))}\u00a0% left`}
          </Fact>
          <Fact name="Its clock">{clockWords[sensor.clock]}</Fact>
        </dl>
        <div className="mt-4">
          <Caution>{coinCellCaution}</Caution>
        </div>
      </Sheet>

      <Sheet title="Where it has hung" id="placements">
        {sensor.placements.length === 0 ? <p className="text-ink-soft">In no room yet.</p> : null}
        <ol className="flex flex-col divide-y divide-line">
          {sensor.placements.map((placement) => (
            <li key={placement.fromAt} className="flex flex-wrap items-center gap-x-3 gap-y-1 py-2">
              <RoomMark mark={placement.room.mark} />
              <span className={placement.toAt === null ? 'font-semibold' : undefined}>
                {placement.room.name}
              </span>
              {placement.spot ? <span className="text-ink-soft">{placement.spot}</span> : null}
              <span className="text-ink-soft">
                from {formatMoment(placement.fromAt, timeZone, new Date(at))}
                {placement.toAt === null
                  ? ' until now'
                  : ` to ${formatMoment(placement.toAt, timeZone, new Date(at))}`}
              </span>
            </li>
          ))}
        </ol>
        {mayChange ? <MoveSensor reader={reader} sensor={sensor} rooms={rooms} /> : null}
      </Sheet>

      {sensor.kind === 'device' ? (
        <>
          <Sheet title="What it sent today" id="counts">
            <SensorCounts counts={sensor.counts} />
            <RefusedMessages reader={reader} sensorId={sensor.id} initial={refused} />
          </Sheet>
          <Sheet title="How it signs in" id="signing-in">
            <div className="flex flex-col gap-4">
              <p className="leading-[44px]">
                It reaches{' '}
                <CopyText
                  text={`${sensor.broker.host}:${String(sensor.broker.port)}`}
                  what="the broker’s address"
                />
                , signs in as <CopyText text={sensor.signInName} what="the sign-in name" /> and publishes to{' '}
                <CopyText text={sensor.topic} what="the address to publish to" />.
              </p>
              {mayChange ? (
                <>
                  <div className="flex flex-col gap-2">
                    <p className="text-label font-semibold">
                      To try it from a terminal, with its secret put in
                    </p>
                    <CopyText text={publishLine(sensor)} what="the line for a terminal" isBlock />
                  </div>
                  <RenewSecret reader={reader} sensor={sensor} />
                </>
              ) : null}
            </div>
          </Sheet>
        </>
      ) : null}
      {mayChange && sensor.kind === 'device' ? <RetireSensor reader={reader} sensor={sensor} /> : null}
    </>
  )
}

function Fact({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <div>
      <dt className="text-label text-ink-soft">{name}</dt>
      <dd>{children}</dd>
    </div>
  )
}

const clockWords: Record<SensorDetail['clock'], string> = {
  right: 'nothing wrong with it',
  'not-set': 'was not set: its times lay before 2020',
  ahead: 'is ahead by more than five minutes: set it',
}

const gapWords = (gapS: number): string =>
  gapS < 90 ? `about ${String(Math.round(gapS))} s` : `about ${String(Math.round(gapS / 60))} min`
