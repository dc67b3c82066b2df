'use client'

import { TimeOutBar } from '@/app/_components/charts/time-out-bar'
import { Button } from '@/app/_components/ui/button'
import { Mark } from '@/app/_components/ui/mark'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { TextLink } from '@/app/_components/ui/text-link'
import { type Carry, type CarryPiece, hasLid } from '@/lib/carry/carry'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { coverWords } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { useCarryActions } from './use-carry-actions'

type OutPieceProps = {
  carry: Carry
  piece: CarryPiece
  reader: Reader
  now: Date
  /** The most urgent of the page has the filled button. */
  isFirst?: boolean
}

/** One piece that is out: what to do, by when, the bar, and the two things that can be done about it. */
export function OutPiece({ carry, piece, reader, now, isFirst = false }: OutPieceProps) {
  // Each piece has its own, so that one that is being brought in holds up no other.
  const actions = useCarryActions(reader.site)
  const { check } = piece
  const outAt = piece.outAt ?? carry.startedAt ?? carry.plannedAt
  const isVerdict = check?.kind === 'verdict'
  const isUnknown = check?.kind === 'unknown'
  const mayDo = may(reader.role, 'carries:do')
  const backWords = piece.fromRoom ? `Back in ${piece.fromRoom.name}` : 'It is back'
  const isShut = piece.cover === 'bagged' || piece.cover === 'tub'
  const coverVerb = isShut ? 'Open again' : 'Bagged, still out'
  return (
    <li className="grid gap-x-6 gap-y-3 border-b border-line py-4 first:pt-0 last:border-b-0 last:pb-0 lg:grid-cols-[minmax(0,1fr)_minmax(0,340px)_auto] lg:items-start">
      <div className="flex gap-4">
        <PieceOutline outline={piece.outline} isOut />
        <div className="min-w-0">
          <p className={`text-verdict font-semibold ${piece.isOverdue ? 'text-warn' : ''}`}>
            {piece.isOverdue ? <Mark kind="leave" className="mr-2 align-[-2px]" /> : null}
            {verbFirst(carry, piece, reader, now)}
          </p>
          <p className="text-label text-ink-soft">
            <TextLink href={`/sites/${reader.site}/pieces/${piece.id}`} className="font-semibold">
              {piece.number}
            </TextLink>{' '}
            {piece.title}, {coverWords[piece.cover]}
          </p>
          <p className="text-label text-ink-soft">{leftWords(piece, reader, now)}</p>
          {piece.isOverdue && hasLid(piece) ? (
            <p>
              <TextLink
                href={`/sites/${reader.site}/carry/${carry.id}#forgotten`}
                aria-label={`I forgot it: ${piece.number}`}
                className="inline-flex min-h-11 items-center"
              >
                I forgot it: how bad, and what now?
              </TextLink>
            </p>
          ) : null}
          {piece.isOverdue ? (
            <p className="text-label text-ink-soft">
              Never force a tight lid, lever it or warm it. Line up the grain, keep both parts side by side,
              and try it cold in about two days. It usually comes back; not always.
            </p>
          ) : null}
        </div>
      </div>
      {isVerdict || isUnknown ? (
        <TimeOutBar
          number={piece.number}
          outAt={outAt}
          now={now}
          earlyAt={isVerdict ? check.earlyAt : null}
          middleAt={isVerdict ? check.middleAt : null}
          plannedBackAt={new Date(new Date(outAt).getTime() + carry.stayMinutes * 60_000).toISOString()}
          isRoomUnknown={isUnknown}
          timeZone={reader.timeZone}
        />
      ) : (
        <p className="text-label text-ink-soft">{check?.kind === 'words' ? check.words : ''}</p>
      )}
      {mayDo ? (
        <div className="flex gap-3 lg:w-56 lg:flex-col">
          <Button
            variant={isFirst ? 'filled' : 'second'}
            aria-label={`${backWords}, ${piece.number}`}
            className="grow"
            pending={actions.bringBack.pending}
            onClick={() => {
              actions.bringBack.act({ carryId: carry.id, pieceIds: [piece.id] })
            }}
          >
            {backWords}
          </Button>
          <Button
            aria-label={`${coverVerb}, ${piece.number}`}
            pending={actions.cover.pending}
            onClick={() => {
              actions.cover.act({
                carryId: carry.id,
                pieceIds: [piece.id],
                cover: isShut ? 'open' : 'bagged',
              })
            }}
          >
            {isShut ? (
              coverVerb
            ) : (
              <span>
                Bagged<span className="max-sm:hidden">, still out</span>
              </span>
            )}
          </Button>
        </div>
      ) : null}
    </li>
  )
}

function verbFirst(carry: Carry, piece: CarryPiece, { timeZone }: Reader, now: Date): string {
  const { check } = piece
  if (check?.kind === 'verdict' && check.earlyAt !== null) {
    const minutes = (new Date(check.earlyAt).getTime() - now.getTime()) / 60_000
    if (minutes <= 0) return `Overdue by ${formatDuration(-minutes)}. Bring it in now`
    const by = formatMoment(check.earlyAt, timeZone, now)
    return minutes <= 60 || check.verdict !== 'fine' ? `Bring it in by ${by}` : `Fine until ${by}`
  }
  if (piece.isOverdue) return 'Out for longer than planned. Bring it in'
  if (check?.kind === 'verdict') return 'It keeps its fit there'
  if (check?.kind === 'unknown') {
    return check.since === null
      ? 'No verdict: look at the lid'
      : `No reading since ${formatMoment(check.since, timeZone, now)}`
  }
  return `Out in ${carry.toRoom.name}`
}

function leftWords({ check }: CarryPiece, { timeZone }: Reader, now: Date): string {
  if (check?.kind === 'unknown') return check.words
  if (check?.kind !== 'verdict') return ''
  const words: string[] = []
  if (check.earlyAt !== null) {
    const minutes = (new Date(check.earlyAt).getTime() - now.getTime()) / 60_000
    if (minutes >= 1 && minutes <= 24 * 60) words.push(`About ${formatDuration(minutes)} left`)
  }
  if (check.middleAt !== null && new Date(check.middleAt) > now) {
    words.push(`more likely good until about ${formatMoment(check.middleAt, timeZone, now)}`)
  }
  const text = words.join('; ')
  return text === '' ? '' : `${text.charAt(0).toUpperCase()}${text.slice(1)}.`
}
