import { formatClock, formatMoment } from '@/lib/format/times'
import type { PieceCheck } from '@/lib/carry/carry-check'
import type { NoticeCarry, NoticePiece, NoticeSensor, Severity } from './inputs'

export const latheCaution = 'If the lathe is running, wait where you can be seen.'
export const tightLidCaution =
  'Never force a tight lid, lever it or warm it: line the grain up, keep the parts side by side, and try it cold in about two days. It usually comes back; not always.'
export const coinCellCaution =
  'Keep coin cells, new and spent, away from children: a swallowed one is an emergency.'

/** "207", "207 and 221", "207, 221 and 226". */
export function listed(words: string[]): string {
  if (words.length < 2) return words.join('')
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
}

export function severityOf(check: PieceCheck | null): Severity {
  if (check === null || check.kind === 'words') return 'fine'
  return check.kind === 'unknown' ? 'unknown' : check.verdict
}

function pieceClause(piece: NoticePiece, timeZone: string, now: Date): string {
  const { check } = piece
  if (check?.kind === 'unknown') return `nothing can be said of ${piece.number}`
  if (check?.kind !== 'verdict' || check.verdict === 'fine') return `${piece.number} may go`
  if (check.verdict === 'leave' || check.earlyAt === null) return `${piece.number} should stay where it is`
  return `${piece.number} must be back by ${formatMoment(check.earlyAt, timeZone, now)}`
}

/** "219 and 214 are down to go to the shop at 14:00: 219 should stay where it is; 214 must be back by 16:10." */
export function plannedTitle(carry: NoticeCarry, timeZone: string, now: Date): string {
  const numbers = listed(carry.pieces.map((piece) => piece.number))
  const verb = carry.pieces.length === 1 ? 'is' : 'are'
  const when = formatMoment(new Date(carry.plannedAt), timeZone, now)
  const intro = `${numbers} ${verb} down to go to ${carry.roomName} at ${when}`
  if (carry.pieces.every((piece) => piece.check?.kind === 'unknown')) {
    return `${intro}, and its humidity is not known: ${unknownSince(carry, timeZone, now)}.`
  }
  return `${intro}: ${carry.pieces.map((piece) => pieceClause(piece, timeZone, now)).join('; ')}.`
}

function unknownSince(carry: NoticeCarry, timeZone: string, now: Date): string {
  return carry.airAt === null
    ? 'it has never been read'
    : `no reading since ${formatMoment(new Date(carry.airAt), timeZone, now)}`
}

/** The reasons of the pieces that should not go as planned, most pressing first. */
export function plannedBody(carry: NoticeCarry): string {
  const reasons = carry.pieces.flatMap(({ number, check }) => {
    if (check?.kind === 'unknown') return [`${number}: ${check.words}`]
    if (check?.kind !== 'verdict' || check.verdict === 'fine') return []
    return [`${number}: ${[check.reason, check.second].filter(Boolean).join(' ')}`]
  })
  return [...reasons, 'Put it off, take it bagged or in the shut tub, or make the stay shorter.'].join('\n')
}

export function nearlyOutTitle(piece: NoticePiece, earlyAt: Date, timeZone: string): string {
  return `Bring ${piece.number} in by ${formatClock(earlyAt, timeZone)}. ${latheCaution}`
}

export function timeOutTitle(piece: NoticePiece, earlyAt: Date, timeZone: string, now: Date): string {
  return `Bring ${piece.number} in now: it was due by ${formatMoment(earlyAt, timeZone, now)}. ${latheCaution}`
}

export function moreLikelyGood(check: PieceCheck | null, timeZone: string, now: Date): string {
  if (check?.kind !== 'verdict' || check.middleAt === null) return ''
  const middle = new Date(check.middleAt)
  const words = `until about ${formatMoment(middle, timeZone, now)}`
  return middle > now ? `More likely good ${words}.` : `It was more likely good only ${words}.`
}

export function silentTitle(sensor: NoticeSensor, timeZone: string, now: Date): string {
  const since =
    sensor.lastHeardAt === null ? '' : ` since ${formatMoment(new Date(sensor.lastHeardAt), timeZone, now)}`
  // Many are named after their room, which need not be said twice.
  const isNamedAfter = sensor.name === sensor.roomName
  const where = sensor.roomName === null || isNamedAfter ? '' : ` in ${sensor.roomName}`
  const name = isNamedAfter ? `The sensor in ${sensor.name}` : sensor.name
  return `${name}${where} has been silent${since}.`
}

export function silentBody(sensor: NoticeSensor): string {
  const out = sensor.piecesOutThere
  const watched =
    out.length === 0
      ? 'No carry there is called fine until it is heard again.'
      : `${listed(out)} ${out.length === 1 ? 'is' : 'are'} out there and nobody knows the air: keep to the time told, or bring ${out.length === 1 ? 'it' : 'them'} in.`
  return `${watched} Look at its battery and at the way to the broker. ${coinCellCaution}`
}
