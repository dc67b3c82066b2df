import type { CarryCheckAnswer, CarryCheckRequest } from '@/lib/carry/carry-answer'
import { groupCover, type WayPiece } from '@/lib/carry/ways'
import { namesOf } from '@/lib/carry/summary'
import { capital } from '@/lib/format/capital'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { type Cover, coverWords } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'

/** One way to make the carry: its words, what it comes to for each piece, and what is sent when it is taken. */
export type Way = {
  key: 'asked' | 'cover' | 'hour' | 'some'
  title: string
  words: string
  pieces: WayPiece[]
  request: CarryCheckRequest
  /** What the button says that takes it. */
  act: string
}

const COVER_DETAIL: Record<Cover, string> = {
  open: 'open the whole time',
  'lid-on': 'the lid on but for while you work it',
  bagged: 'shut tight in a bag; each out of it only while you work it',
  tub: 'with about 1 kg of house-dry offcuts; each out of it only while you work it',
}
const COVER_ACT: Record<Cover, string> = {
  open: 'open',
  'lid-on': 'with the lid on',
  bagged: 'bagged',
  tub: 'in the tub',
}

/** As asked, in the best cover, at the better hour. Those of them that there are. */
export function waysOf(
  answer: CarryCheckAnswer,
  request: CarryCheckRequest,
  reader: Reader,
  now: Date,
  mode: 'now' | 'plan',
): Way[] {
  const when = mode === 'now' ? 'Now' : `At ${formatMoment(answer.startsAt, reader.timeZone, now)}`
  const asked: Way = {
    key: 'asked',
    title: `${when}, ${coverWords[answer.cover]}`,
    words: mode === 'now' ? 'as asked' : 'as planned',
    pieces: askedPieces(answer),
    request,
    act: mode === 'now' ? 'Take it out now' : 'Plan it',
  }
  const better = groupCover(answer.pieces, answer.cover)
  const count = answer.pieces.length
  const them = count === 1 ? 'it' : 'them'
  const cover: Way[] =
    better === undefined
      ? []
      : [
          {
            key: 'cover',
            title: `${when}, ${better.cover === 'tub' ? 'in the shut tub' : coverWords[better.cover]}`,
            words: `${COVER_DETAIL[better.cover]}${readIn(answer, better.cover)}`,
            pieces: better.pieces,
            request: { ...request, cover: better.cover },
            act: `${mode === 'now' ? 'Take' : 'Plan'} ${them} ${COVER_ACT[better.cover]}`,
          },
        ]
  return [asked, ...cover, ...hourWay(answer, request, reader, now)]
}

function askedPieces(answer: CarryCheckAnswer): WayPiece[] {
  return answer.pieces.flatMap(({ id, check }) =>
    check.kind === 'verdict' ? { id, verdict: check.verdict, earlyAt: check.earlyAt } : [],
  )
}

/** The tub's own sensor, where that was gone by. */
function readIn(answer: CarryCheckAnswer, cover: Cover): string {
  const name = answer.pieces.find((piece) => piece.bestCover?.cover === cover)?.bestCover?.readIn
  return name ? `; by what ${name} reads` : ''
}

function hourWay(answer: CarryCheckAnswer, request: CarryCheckRequest, reader: Reader, now: Date): Way[] {
  const hour = answer.betterHour
  if (hour === null) return []
  const moment = (at: string) => formatMoment(at, reader.timeZone, now)
  const lit = hour.ifLitAt === null ? '' : `if you light it at ${moment(hour.ifLitAt)}; `
  const count = answer.pieces.length
  const what = count === 1 ? 'it' : count === 2 ? 'both' : 'all'
  return [
    {
      key: 'hour',
      title: `${capital(moment(hour.startsAt))}, ${coverWords[answer.cover]}`,
      words: `${lit}${answer.room.name} should be at about ${hour.emcPct.toFixed(1)}\u00a0%\u00a0MC`,
      pieces: hour.pieces,
      request: { ...request, startsAt: hour.startsAt },
      act: `Put ${what} off to ${moment(hour.startsAt)}`,
    },
  ]
}

/** Only those that may go; nothing where all of them or none may. */
export function someWay(answer: CarryCheckAnswer, request: CarryCheckRequest): Way | undefined {
  const going = answer.pieces.filter(({ check }) => !(check.kind === 'verdict' && check.verdict === 'leave'))
  if (going.length === 0 || going.length === answer.pieces.length) return undefined
  return {
    key: 'some',
    title: '',
    words: '',
    pieces: [],
    request: { ...request, pieceIds: going.map((piece) => piece.id) },
    act: `Take ${namesOf(going)} only`,
  }
}

const RANK = { fine: 0, 'keep-short': 1, leave: 2 }
const sumOf = (way: Way): number => way.pieces.reduce((sum, piece) => sum + RANK[piece.verdict], 0)

/** The way that best keeps the fits: it is the one that stands on wash and has the filled button. */
export const bestWay = (ways: readonly Way[]): Way | undefined =>
  ways.toSorted((a, b) => sumOf(a) - sumOf(b))[0]

/** "For the planned 3 h". */
export const stayAside = (answer: CarryCheckAnswer): string => `for ${formatDuration(answer.stayMinutes)}`
