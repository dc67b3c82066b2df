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
import { requestOf, roomOf, useCarryForm } from './carry-form-state'
import { CarryLists } from './carry-lists'
import { CarrySentence } from './carry-sentence'
import { CheckPieces } from './check-pieces'
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
  const request = requestOf(form, chosen, room, reader.timeZone, now, defaultAt)
  const check = useCarryCheck(
    site,
    [form.pieces, room?.id, form.mode, form.at ?? defaultAt, form.since, form.stay, form.cover],
    request,
  )
  const answer = request === null ? undefined : check.data
  const isBaggedBetter = answer?.pieces.some((piece) => isBetter(piece)) ?? false
  const takeBagged = () => {
    void setForm({ cover: 'bagged' })
  }

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
            defaultAt={defaultAt}
          />
        </Sheet>
        {answer && !check.isError ? (
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
      {answer &&
      !check.isError &&
      answer.pieces.some((piece) => piece.bagged !== null) &&
      (form.cover === 'open' || form.cover === 'lid-on') ? (
        <WaysSheet
          answer={answer}
          reader={reader}
          now={now}
          isBaggedBetter={isBaggedBetter}
          onBagged={takeBagged}
        />
      ) : null}
      {request && may(reader.role, 'carries:do') ? (
        <div className="contents sm:block">
          <CarryDecision
            reader={reader}
            request={request}
            answer={answer}
            mode={form.mode}
            isLogged={form.mode === 'now' && form.since > 0}
            isBaggedBetter={isBaggedBetter && (form.cover === 'open' || form.cover === 'lid-on')}
            onBagged={takeBagged}
            onDone={(carry) => {
              router.push(`/sites/${site}/carry/${carry.id}`)
            }}
          />
        </div>
      ) : null}
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

const order = ['leave', 'keep-short', 'fine']

/** Whether a piece does better bagged: a better verdict, or the same with more time. */
function isBetter({
  check,
  bagged,
}: {
  check: { kind: string; verdict?: string }
  bagged: { verdict: string } | null
}) {
  if (bagged === null) return false
  return check.kind === 'verdict' && order.indexOf(bagged.verdict) > order.indexOf(check.verdict ?? 'fine')
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
