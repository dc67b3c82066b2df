'use client'

import { useRouter } from 'next/navigation'
import { describeError } from '@/app/_components/api'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Cautions } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState, ErrorState } from '@/app/_components/ui/states'
import { useNow } from '@/app/_components/ui/use-now'
import type { Carry } from '@/lib/carry/carry'
import { localFieldValue, nextFullHour } from '@/lib/format/local-time'
import type { Piece } from '@/lib/pieces/piece'
import type { Room } from '@/lib/rooms/room'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { CarryDecision } from './carry-decision'
import { OTHER_AIR, requestOf, roomOf, toldAirOf, useCarryForm } from './carry-form-state'
import { CarryLists } from './carry-lists'
import { CarrySentence } from './carry-sentence'
import { bestWay, waysOf } from './carry-ways'
import { CheckPieces } from './check-pieces'
import { CoverChoice } from './cover-choice'
import { HoursSheet } from './hours-sheet'
import { KeepAsRoom } from './keep-as-room'
import { KeepsSheet } from './keeps-sheet'
import { SessionSheet } from './session-sheet'
import { useCarryCheck } from './use-carry-check'
import { WaysSheet } from './ways-sheet'

export type Page<Item> = { items: Item[]; nextCursor: string | null }

type CarryPageViewProps = {
  reader: Reader
  pieces: Page<Piece>
  rooms: Page<Room>
  open: Page<Carry>
  ended: Page<Carry>
}

/** Going now, or plan one: the sentence asks, the check answers piece by piece, then it is done or left. */
export function CarryPageView({
  reader,
  pieces: initialPieces,
  rooms: initialRooms,
  open,
  ended,
}: CarryPageViewProps) {
  const router = useRouter()
  const now = useNow(reader.at)
  const site = reader.site
  const { data: pieces = initialPieces } = useSiteQuery<Page<Piece>>({
    site,
    area: 'pieces',
    key: ['for-carry'],
    path: '/pieces?sort=number&limit=200',
    initial: initialPieces,
  })
  const { data: rooms = initialRooms } = useSiteQuery<Page<Room>>({
    site,
    area: 'rooms',
    key: ['list'],
    path: '/rooms',
    initial: initialRooms,
  })
  const [form, setForm] = useCarryForm()
  const chosen = form.pieces.flatMap((id) => pieces.items.find((piece) => piece.id === id) ?? [])
  const room = roomOf(rooms.items, form.to)
  const defaultAt = localFieldValue(nextFullHour(new Date(reader.at), reader.timeZone), reader.timeZone)
  const { units, timeZone } = reader
  const request = requestOf({ form, chosen, room, units, timeZone, now, defaultAt })
  const toldAir = form.to === OTHER_AIR ? toldAirOf(form, units) : undefined
  const where = form.to === OTHER_AIR ? toldAir : room?.id
  const check = useCarryCheck(
    site,
    [form.pieces, where, form.mode, form.at ?? defaultAt, form.since, form.stay, form.cover],
    request,
  )
  const answer = request === null || check.isError ? undefined : check.data
  const ways = answer && request ? waysOf(answer, request, reader, now, form.mode) : []
  const best = bestWay(ways)

  if (pieces.items.length === 0 || rooms.items.length < 2) {
    return (
      <>
        <PageSentence>A carry takes a piece to other air for a while, and back.</PageSentence>
        <NothingToCarry
          reader={reader}
          hasPieces={pieces.items.length > 0}
          hasRooms={rooms.items.length >= 2}
        />
      </>
    )
  }
  return (
    <>
      <PageSentence>
        {answer ? answer.headline : 'Choose what goes and where, and see whether its fit will hold.'}
      </PageSentence>
      <div className={`flex flex-col gap-7 ${answer ? 'max-sm:flex-col-reverse' : ''}`}>
        <Sheet id="carry">
          <CarrySentence
            form={form}
            setForm={setForm}
            pieces={pieces.items}
            chosen={chosen}
            rooms={rooms.items}
            room={room}
            units={units}
            defaultAt={defaultAt}
          />
          <div className="mt-5">
            <CoverChoice
              cover={form.cover}
              onChange={(cover) => {
                void setForm({ cover })
              }}
              answer={check.isPlaceholderData ? undefined : answer}
              reader={reader}
              now={now}
            />
          </div>
          {form.to === OTHER_AIR && toldAir === undefined ? (
            <p className="mt-3 text-label text-ink-soft">
              Give the place a name, its temperature and its humidity. A guess will do: it is taken as ±
              5&nbsp;% RH.
            </p>
          ) : null}
        </Sheet>
        {answer ? (
          <CheckPieces
            answer={answer}
            pieces={pieces.items}
            reader={reader}
            now={now}
            isOld={check.isPlaceholderData}
          />
        ) : null}
      </div>
      {check.isError && request ? (
        <Sheet>
          <ErrorState
            title={describeError(check.error).title}
            pending={check.isFetching}
            onRetry={() => {
              void check.refetch()
            }}
          >
            {describeError(check.error).detail}
          </ErrorState>
        </Sheet>
      ) : null}
      {request && !answer && check.isFetching ? (
        <p role="status" className="px-4 text-ink-soft sm:px-0">
          Working it out.
        </p>
      ) : null}
      <p role="status" className="sr-only">
        {answer && !check.isPlaceholderData ? answer.headline : ''}
      </p>
      {answer && ways.length > 1 ? (
        <WaysSheet answer={answer} ways={ways} best={best} reader={reader} now={now} />
      ) : null}
      {request?.toAir && answer ? (
        <KeepAsRoom
          reader={reader}
          air={request.toAir}
          onKept={(roomId) => {
            void setForm({ to: roomId, place: null, temperature: null, humidity: null })
          }}
        />
      ) : null}
      {request?.toRoomId && may(reader.role, 'carries:do') ? (
        <div className="contents sm:block">
          <CarryDecision
            reader={reader}
            request={request}
            answer={answer}
            ways={ways}
            best={best}
            mode={form.mode}
            isLogged={form.mode === 'now' && form.since > 0}
            onDone={(carry) => {
              router.push(`/sites/${site}/carry/${carry.id}`)
            }}
          />
        </div>
      ) : null}
      {answer?.session ? <SessionSheet session={answer.session} reader={reader} now={now} /> : null}
      {answer ? <HoursSheet answer={answer} reader={reader} now={now} /> : null}
      {answer ? <KeepsSheet answer={answer} reader={reader} now={now} /> : null}
      {answer ? (
        <div className="flex flex-col gap-3 max-sm:px-4">
          {answer.forecastNote ? (
            <p className="max-w-words text-label text-ink-soft">{answer.forecastNote}</p>
          ) : null}
          <Cautions cautions={answer.cautions} />
        </div>
      ) : null}
      <CarryLists reader={reader} now={now} open={open} ended={ended} />
    </>
  )
}

function NothingToCarry({
  reader,
  hasPieces,
  hasRooms,
}: {
  reader: Reader
  hasPieces: boolean
  hasRooms: boolean
}) {
  const base = `/sites/${reader.site}`
  return (
    <Sheet>
      <EmptyState
        title={hasRooms ? 'No piece yet' : 'A carry needs two rooms'}
        actions={
          <>
            {!hasRooms && may(reader.role, 'rooms:change') ? (
              <ButtonLink href={`${base}/rooms`} variant="filled">
                Add a room
              </ButtonLink>
            ) : null}
            {hasRooms && !hasPieces && may(reader.role, 'pieces:change') ? (
              <ButtonLink href={`${base}/pieces/new`} variant="filled">
                Add a piece
              </ButtonLink>
            ) : null}
          </>
        }
      >
        With a piece, the room that it stands in and the room that it goes to, the check can say how long its
        fit will hold there.
      </EmptyState>
    </Sheet>
  )
}
