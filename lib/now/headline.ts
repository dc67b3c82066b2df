import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { namesOf } from '@/lib/carry/summary'
import { formatEmc, formatPoints } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import type { NowView, RuleRoom } from './now-view'

type Part = NowView['headline'][number]

export interface HeadlineInput {
  out: readonly Carry[]
  planned: readonly Carry[]
  rooms: readonly RuleRoom[]
  timeZone: string
  now: Date
}

const plain = (text: string): Part => ({ text, strong: false })
const strong = (text: string): Part => ({ text, strong: true })

interface PieceOut {
  carry: Carry
  piece: CarryPiece
}

const edgeOf = (check: PieceCheck | null): number =>
  check?.kind === 'verdict' && check.earlyAt !== null ? new Date(check.earlyAt).getTime() : Infinity

/**
 * The sentence at the top of Now: the most urgent thing, and only that.
 * Overdue, then what has to come in soonest, then what is out with nobody knowing the air, then what is planned.
 */
export function nowHeadline(input: HeadlineInput): Part[] {
  const out = input.out.flatMap((carry) =>
    carry.pieces
      .filter((piece) => piece.outAt !== null && piece.backAt === null)
      .map((piece) => ({ carry, piece })),
  )
  return (
    overdue(out, input) ??
    dueIn(out, input) ??
    outUnknown(out, input) ??
    planned(input) ??
    outAtEase(out) ??
    nothingOut(input)
  )
}

function overdue(out: readonly PieceOut[], input: HeadlineInput): Part[] | undefined {
  const late = out
    .filter(({ piece }) => piece.isOverdue)
    .toSorted((a, b) => edgeOf(a.piece.check) - edgeOf(b.piece.check) || 0)
  const [first] = late
  if (first === undefined) return undefined
  const names = strong(namesOf(late.map(({ piece }) => piece)))
  const { check } = first.piece
  if (check?.kind !== 'verdict' || check.earlyAt === null)
    return [
      plain('Bring '),
      names,
      plain(` in now: out in ${first.carry.toRoom.name} for longer than planned.`),
    ]
  return [
    plain('Bring '),
    names,
    plain(` in now: the time out in ${first.carry.toRoom.name} was used up at `),
    strong(formatMoment(check.earlyAt, input.timeZone, input.now)),
    plain('.'),
  ]
}

function dueIn(out: readonly PieceOut[], input: HeadlineInput): Part[] | undefined {
  const due = out
    .filter(({ piece }) => edgeOf(piece.check) < Infinity)
    .toSorted((a, b) => edgeOf(a.piece.check) - edgeOf(b.piece.check))
  const [first] = due
  if (first?.piece.check?.kind !== 'verdict' || first.piece.check.earlyAt === null) return undefined
  const more = out.length - 1
  return [
    plain('Bring '),
    strong(first.piece.number),
    plain(` in from ${first.carry.toRoom.name} by `),
    strong(formatMoment(first.piece.check.earlyAt, input.timeZone, input.now)),
    plain(more === 0 ? '.' : `; ${String(more)} more ${more === 1 ? 'is' : 'are'} out.`),
  ]
}

function outUnknown(out: readonly PieceOut[], input: HeadlineInput): Part[] | undefined {
  const blind = out.filter(({ piece }) => piece.check?.kind === 'unknown')
  const [first] = blind
  if (first?.piece.check?.kind !== 'unknown') return undefined
  const { since } = first.piece.check
  const names = strong(namesOf(blind.map(({ piece }) => piece)))
  const verb = blind.length === 1 ? ' is out and ' : ' are out and '
  const room = first.carry.toRoom.name
  return since === null
    ? [names, plain(`${verb}the air in ${room} is unknown: look at ${blind.length === 1 ? 'it' : 'them'}.`)]
    : [
        names,
        plain(`${verb}there is no reading from ${room} since `),
        strong(formatMoment(since, input.timeZone, input.now)),
        plain(': look at the lid.'),
      ]
}

function planned(input: HeadlineInput): Part[] | undefined {
  const bad = ['leave', 'unknown', 'keep-short']
  const next = input.planned.toSorted(
    (a, b) => new Date(a.plannedAt).getTime() - new Date(b.plannedAt).getTime(),
  )
  const carry =
    next.find((one) => one.worst === 'leave') ?? next.find((one) => bad.includes(one.worst)) ?? next[0]
  if (carry === undefined) return undefined
  const when = strong(formatMoment(carry.plannedAt, input.timeZone, input.now))
  if (carry.takesWhatever)
    return [plain(`Planned for ${carry.toRoom.name} at `), when, plain(`. ${carry.whatever ?? ''}`.trimEnd())]
  const pressing = carry.pieces.filter((piece) => piece.check !== null && gradeIs(piece.check, carry.worst))
  const names = strong(namesOf(pressing.length > 0 ? pressing : carry.pieces))
  const room = carry.toRoom.name
  if (carry.worst === 'leave')
    return [
      plain('Leave '),
      names,
      plain(` where it is: planned for ${room} at `),
      when,
      plain(', the fit would not keep for long enough to be of use.'),
    ]
  if (carry.worst === 'unknown')
    return [
      plain(`No verdict for `),
      names,
      plain(`, planned for ${room} at `),
      when,
      plain(': no fresh reading there.'),
    ]
  if (carry.worst === 'keep-short') {
    const edge = Math.min(...carry.pieces.map((piece) => edgeOf(piece.check)))
    const by =
      edge === Infinity
        ? []
        : [plain(': back by '), strong(formatMoment(new Date(edge), input.timeZone, input.now))]
    return [names, plain(` may go to ${room} at `), when, ...by, plain('.')]
  }
  return [
    names,
    plain(` may go to ${room} at `),
    when,
    plain(carry.worst === 'fine' ? ': the fit keeps for the stay.' : '.'),
  ]
}

const gradeIs = (check: PieceCheck, worst: Carry['worst']): boolean =>
  (check.kind === 'verdict' ? check.verdict : check.kind) === worst

function outAtEase(out: readonly PieceOut[]): Part[] | undefined {
  const [first] = out
  if (first === undefined) return undefined
  const names = strong(namesOf(out.map(({ piece }) => piece)))
  const one = out.length === 1
  const isJudged = out.every(({ piece }) => piece.check?.kind === 'verdict')
  const rest = isJudged
    ? one
      ? ' is out and keeps its fit there.'
      : ' are out and keep their fit there.'
    : one
      ? ` is out in ${first.carry.toRoom.name}; its fit is not worked out.`
      : ' are out; not every fit can be worked out.'
  return [names, plain(rest)]
}

/** Only what is logged is known, so it never says that nothing is out. */
function nothingOut({ rooms, timeZone, now }: HeadlineInput): Part[] {
  const nothing = plain('Nothing is logged out. ')
  if (rooms.length === 0) return [nothing, plain('Add a room to begin.')]
  const fresh = rooms.flatMap((room) => (room.air.kind === 'fresh' ? [{ ...room, air: room.air }] : []))
  const focus = fresh.find((room) => room.isFocus) ?? fresh[0]
  if (focus === undefined) {
    const stale = rooms.flatMap((room) =>
      room.air.kind === 'stale' ? [{ name: room.name, at: room.air.at }] : [],
    )
    const newest = stale.toSorted((a, b) => b.at.localeCompare(a.at))[0]
    return newest === undefined
      ? [nothing, plain('No room has been read yet: add a sensor, or type in what a dial says.')]
      : [
          nothing,
          plain('No fresh reading anywhere: the last came from '),
          plain(`${newest.name} at `),
          strong(formatMoment(newest.at, timeZone, now)),
          plain('.'),
        ]
  }
  const furthest = fresh
    .filter((room) => room.id !== focus.id)
    .toSorted(
      (a, b) => Math.abs(b.air.emcPct - focus.air.emcPct) - Math.abs(a.air.emcPct - focus.air.emcPct),
    )[0]
  if (furthest === undefined)
    return [nothing, plain(`${focus.name} is at `), strong(formatEmc(focus.air.emcPct)), plain('.')]
  const points = Math.abs(furthest.air.emcPct - focus.air.emcPct)
  if (points < noTellingDifferencePct)
    return [
      nothing,
      plain('There is no telling difference between the rooms: about '),
      strong(formatEmc(focus.air.emcPct)),
      plain('.'),
    ]
  const way = furthest.air.emcPct > focus.air.emcPct ? 'damper' : 'drier'
  return [
    nothing,
    plain(`${furthest.name} is `),
    strong(formatPoints(points)),
    plain(` of % MC ${way} than ${focus.name}.`),
  ]
}
