'use client'

import { MoistureRule } from '@/app/_components/charts/moisture-rule'
import type { RuleModel } from '@/app/_components/charts/rule-model'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Age } from '@/app/_components/ui/age'
import { type Column, DataTable } from '@/app/_components/ui/data-table'
import { Mark } from '@/app/_components/ui/mark'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { useNow } from '@/app/_components/ui/use-now'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { type Room, roomKindWords } from '@/lib/rooms/room'
import { roomsHeadline } from '@/lib/rooms/rooms-headline'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { roomFlag } from '../../_components/now-rule'
import { AddRoom } from './add-room'

type RoomPage = { items: Room[]; nextCursor: string | null }

export function RoomsView({ reader, initial }: { reader: Reader; initial: RoomPage }) {
  const { data: page = initial } = useSiteQuery<RoomPage>({
    site: reader.site,
    area: 'rooms',
    key: ['list'],
    path: '/rooms',
    initial,
  })
  const now = useNow(reader.at)
  const rooms = page.items
  const mayChange = may(reader.role, 'rooms:change')
  const clock = { timeZone: reader.timeZone, now }
  const flags = rooms
    .map((room) => roomFlag({ ...room, isFocus: false, year: null }, clock))
    .filter((flag) => flag !== null)
  const model: RuleModel = {
    flags,
    bands: [],
    brackets: [],
    shelf: [],
    sentence: `The rooms on the moisture rule: ${flags.map((flag) => `${flag.name} ${flag.value}`).join(', ')}.`,
  }
  const add = mayChange ? <AddRoom site={reader.site} isFirst={rooms.length === 0} /> : null

  return (
    <>
      <PageSentence parts={roomsHeadline(rooms)} />
      {flags.length > 0 ? (
        <MoistureRule
          model={model}
          title="Where wood would end in each room, given time"
          aside="Points are points of % MC"
        />
      ) : null}
      <Sheet id="rooms" title="Rooms" action={rooms.length > 0 ? add : undefined}>
        {rooms.length === 0 ? (
          <EmptyState title="No room yet" actions={add}>
            {reader.role === 'onlooker'
              ? 'No room is shared with you yet.'
              : 'A room is any air that wood can sit in: the cupboard where boxes are kept, the shop, a lidded tub.'}
          </EmptyState>
        ) : (
          <DataTable
            caption="The rooms and their air"
            rows={rooms}
            rowKey={(room) => room.id}
            columns={columns(reader, now)}
          />
        )}
      </Sheet>
    </>
  )
}

function columns(reader: Reader, now: Date): Column<Room>[] {
  const isOnlooker = reader.role === 'onlooker'
  return [
    {
      id: 'name',
      header: 'Room',
      phone: 'title',
      cell: (room) => (
        <span className="inline-flex items-baseline gap-2">
          <RoomMark mark={room.mark} />
          <TextLink href={`/sites/${reader.site}/rooms/${room.id}`} className="font-semibold">
            {room.name}
          </TextLink>
          {room.name.toLowerCase().includes(roomKindWords[room.kind]) ? null : (
            <span className="text-label font-normal text-ink-soft">{roomKindWords[room.kind]}</span>
          )}
        </span>
      ),
    },
    {
      id: 'emc',
      header: 'Wood ends at',
      phone: 'line',
      align: 'right',
      cell: (room) => (room.air.kind === 'never' ? 'no reading yet' : formatEmc(room.air.emcPct)),
    },
    {
      id: 'air',
      header: isOnlooker ? 'Air, the last whole day' : 'Air',
      phone: 'line',
      align: 'right',
      cell: (room) =>
        room.air.kind === 'never'
          ? '–'
          : `${formatTemperature(room.air.temperatureC, reader.units)}, ${formatHumidity(room.air.humidityPct)}`,
    },
    {
      id: 'age',
      header: 'Heard',
      phone: 'line',
      cell: (room) => {
        if (room.air.kind === 'never') return '–'
        if (room.air.kind === 'fresh') {
          return (
            <>
              <Age at={room.air.at} timeZone={reader.timeZone} now={reader.at} />
              {room.air.isTyped ? ', typed in' : ''}
            </>
          )
        }
        return (
          <span className="inline-flex items-baseline gap-2 text-warn">
            <Mark kind="silent" className="translate-y-[3px]" />
            no reading since {formatMoment(room.air.at, reader.timeZone, now)}
          </span>
        )
      },
    },
    ...(isOnlooker
      ? []
      : [
          {
            id: 'pieces',
            header: 'Pieces',
            phone: 'line' as const,
            align: 'right' as const,
            cell: (room: Room) => String(room.pieces),
          },
        ]),
  ]
}
