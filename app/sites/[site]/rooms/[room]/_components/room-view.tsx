'use client'

import { MoistureRule } from '@/app/_components/charts/moisture-rule'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Age } from '@/app/_components/ui/age'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Cautions } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { Sheet } from '@/app/_components/ui/sheet'
import { StaleState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { useNow } from '@/app/_components/ui/use-now'
import type { RoomForecastView } from '@/lib/forecast/forecast-view'
import {
  formatCount,
  formatEmc,
  formatEmcFigure,
  formatHumidity,
  formatTemperature,
} from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { type RoomDetail, roomKindWords, type RoomSeries } from '@/lib/rooms/room'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { FindableWood } from '@/lib/wood/find-woods'
import { EditRoom } from './edit-room'
import { feltMarks } from './felt-marks'
import { FeltSheet } from './felt-sheet'
import { ForecastSheet } from './forecast-sheet'
import { RoomChart } from './room-chart'
import { roomRule } from './room-rule'
import type { Span } from './span'
import { TypeReading } from './type-reading'
import { type InitialFelt, useFelt } from './use-felt'

type RoomViewProps = {
  reader: Reader
  initial: RoomDetail
  initialSeries: { span: Span; series: RoomSeries }
  initialFelt: InitialFelt | undefined
  /** The woods that its felt EMC can be reckoned for. */
  woods: readonly FindableWood[]
  /** Null for those who see whole days only. */
  initialForecast: RoomForecastView | null
}

/** What this room does to wood: now, today, this month, in numbers and in plain words. */
export function RoomView(props: RoomViewProps) {
  const { reader, initial, initialSeries, initialFelt, woods, initialForecast } = props
  const { data: room = initial } = useSiteQuery<RoomDetail>({
    site: reader.site,
    area: 'rooms',
    key: ['one', initial.id],
    path: `/rooms/${initial.id}`,
    initial,
  })
  const felt = useFelt(reader.site, initial.id, initialFelt)
  const now = useNow(reader.at)
  const base = `/sites/${reader.site}`
  return (
    <>
      <PageSentence
        above={
          <>
            <RoomMark mark={room.mark} />
            {roomNameAndKind(room)}
            {room.isShared ? ', shared with onlookers' : ''}
          </>
        }
      >
        {room.headline}
      </PageSentence>
      <div className="flex flex-wrap gap-3 px-4 max-sm:flex-col sm:px-0">
        {may(reader.role, 'carries:do') ? (
          <ButtonLink href={`${base}/carry?to=${room.id}`} variant="filled">
            Check a carry here
          </ButtonLink>
        ) : null}
        {may(reader.role, 'readings:type') ? (
          <TypeReading site={reader.site} room={room} units={reader.units} />
        ) : null}
        {may(reader.role, 'rooms:change') ? <EditRoom site={reader.site} room={room} /> : null}
      </div>
      <MoistureRule
        model={roomRule(room, feltMarks(felt.query.data, reader.units), reader.timeZone, now)}
        title="What this room does to wood"
        aside="Where wood would end, given time; felt: what it has followed so far"
        note={<AirNow room={room} reader={reader} now={now} />}
      />
      {room.cautions.length > 0 ? (
        <div className="max-sm:px-4">
          <Cautions cautions={room.cautions} />
        </div>
      ) : null}
      {initialForecast === null ? null : (
        <ForecastSheet reader={reader} initial={initialForecast} now={now} />
      )}
      <RoomChart reader={reader} roomId={room.id} initial={initialSeries} now={now} />
      <FeltSheet reader={reader} felt={felt} woods={woods} now={now} />
      <div className="grid gap-7 lg:grid-cols-2 lg:items-start">
        <Sheet id="words" title="In plain words">
          {room.words.length === 0 ? (
            <p className="text-ink-soft">Nothing yet: with a day of readings there is something to say.</p>
          ) : (
            <ul>
              {room.words.map((words) => (
                <li key={words} className="border-b border-line py-3 first:pt-0 last:border-b-0 last:pb-0">
                  {words}
                </li>
              ))}
            </ul>
          )}
          {room.note ? <p className="mt-4 text-label text-ink-soft">{room.note}</p> : null}
        </Sheet>
        {reader.role === 'onlooker' ? null : <HereNow room={room} base={base} />}
      </div>
    </>
  )
}

/** "Landing cupboard, cupboard in the house"; just "Shop" where its kind would say the same again. */
function roomNameAndKind({ name, kind }: RoomDetail): string {
  const words = roomKindWords[kind]
  return name.toLowerCase().includes(words) ? name : `${name}, ${words}`
}

function AirNow({ room, reader, now }: { room: RoomDetail; reader: Reader; now: Date }) {
  const { air } = room
  if (air.kind === 'never') {
    return (
      <p className="max-w-words text-ink-soft">
        No reading yet. Type in what a dial shows, or let a sensor do it, and the room will hang here.
      </p>
    )
  }
  const figures = (
    <>
      <strong>
        {formatTemperature(air.temperatureC, reader.units)}, {formatHumidity(air.humidityPct)}
      </strong>
      {air.dewPointC === null ? '' : `, dew point ${formatTemperature(air.dewPointC, reader.units)}`}
    </>
  )
  if (air.kind === 'stale') {
    return (
      <StaleState>
        No reading since {formatMoment(air.at, reader.timeZone, now)}. Then it was {figures}. The last value
        stays with its time; nothing is called fine on it.
      </StaleState>
    )
  }
  return (
    <p className="max-w-words">
      {reader.role === 'onlooker' ? (
        <>The last whole day: </>
      ) : (
        <>
          {air.isTyped ? 'Typed in' : 'Heard'} <Age at={air.at} timeZone={reader.timeZone} now={reader.at} />
          :{' '}
        </>
      )}
      {figures}, {formatEmc(air.emcPct)} give or take {formatEmcFigure(air.emcDoubtPct)}.
    </p>
  )
}

function HereNow({ room, base }: { room: RoomDetail; base: string }) {
  return (
    <Sheet id="here" title="Here now" aside={formatCount(room.here.length, 'piece')}>
      {room.here.length === 0 ? (
        <p className="text-ink-soft">Nothing is logged here.</p>
      ) : (
        <ul>
          {room.here.map((piece) => (
            <li key={piece.id} className="flex items-center gap-4 border-b border-line py-2 last:border-b-0">
              <PieceOutline outline={piece.stage === 'box' ? 'tall' : 'pair'} isOut={piece.isOut} size={34} />
              <p>
                <TextLink
                  href={`${base}/pieces/${piece.id}`}
                  className="inline-flex min-h-11 items-center font-semibold"
                >
                  {piece.number}
                </TextLink>{' '}
                {piece.title}
                {piece.isOut ? ', out' : ''}
              </p>
            </li>
          ))}
        </ul>
      )}
      <div className="mt-4 text-label text-ink-soft">
        {room.hangs.length === 0 ? (
          <p>No sensor hangs here.</p>
        ) : (
          <ul>
            {room.hangs.map((sensor) => (
              <li key={sensor.id}>
                {sensor.isTyped ? (
                  'Readings typed in by hand'
                ) : (
                  <>
                    Sensor{' '}
                    <TextLink
                      href={`${base}/sensors/${sensor.id}`}
                      className="inline-flex min-h-11 items-center"
                    >
                      {sensor.name}
                    </TextLink>
                    {sensor.spot ? `, ${sensor.spot}` : ''}
                  </>
                )}
              </li>
            ))}
          </ul>
        )}
      </div>
    </Sheet>
  )
}
