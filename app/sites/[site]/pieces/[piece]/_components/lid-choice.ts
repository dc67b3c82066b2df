import { jointAt, type LidPlace } from '@/lib/fit/lid-place'
import { clearanceCurve, type CurvePoint, type DoubtfulJoint } from '@/lib/fit/clearance-curve'
import { feelOfCut, feelWords } from '@/lib/fit/feel'
import { clearanceExactMm } from '@/lib/fit/lid-fit'
import { formatEmc } from '@/lib/format/figures'
import { formatDuration } from '@/lib/format/times'
import type { Cover } from '@/lib/pieces/piece'
import { coverWords } from '@/lib/pieces/piece'
import type { LidRoom, PieceFit } from '@/lib/pieces/piece-fit'

/** In what state the lid is to be seen: as it is now, or after a stay; `stayMinutes` null: given time. */
export type LidChoice =
  | { readonly kind: 'now' }
  | {
      readonly kind: 'there'
      readonly roomId: string
      readonly stayMinutes: number | null
      readonly cover: Cover
    }

export type LidPreset = { readonly key: string; readonly label: string; readonly choice: LidChoice }

type Joined = PieceFit & { readonly lid: Extract<PieceFit['lid'], { kind: 'joint' }> }

export const isJoined = (fit: PieceFit): fit is Joined => fit.lid.kind === 'joint'

/** An evening to the next morning. */
const OVERNIGHT_MINUTES = 14 * 60

/** The room furthest from where the lid's wood stands, of those with a fresh reading. */
export function furthestRoom({ lid, rooms }: Joined): LidRoom | undefined {
  const away = (room: LidRoom) =>
    room.place === null ? -1 : Math.abs(room.place.ringMcPct - lid.now.ringMcPct)
  return rooms.filter(({ place }) => place !== null).toSorted((one, other) => away(other) - away(one))[0]
}

/** What a maker asks first: now, two hours and a night in the room furthest off, and its keep room given time. */
export function lidPresets(fit: Joined): readonly LidPreset[] {
  const far = furthestRoom(fit)
  const keep = fit.rooms.find(({ id, place }) => id === fit.keepRoom?.id && place !== null)
  const there = (roomId: string, stayMinutes: number | null): LidChoice => ({
    kind: 'there',
    roomId,
    stayMinutes,
    cover: 'open',
  })
  return [
    { key: 'now', label: 'Now', choice: { kind: 'now' } },
    ...(far === undefined
      ? []
      : [
          { key: 'far-2h', label: `${far.name} after 2 h`, choice: there(far.id, 120) },
          { key: 'far-night', label: `${far.name} overnight`, choice: there(far.id, OVERNIGHT_MINUTES) },
        ]),
    ...(keep === undefined || keep.id === far?.id
      ? []
      : [{ key: 'keep', label: `${keep.name}, given time`, choice: there(keep.id, null) }]),
  ]
}

export const sameChoice = (one: LidChoice, other: LidChoice): boolean =>
  one.kind === 'now' || other.kind === 'now'
    ? one.kind === other.kind
    : one.roomId === other.roomId && one.stayMinutes === other.stayMinutes && one.cover === other.cover

/** What to ask of the server for a choice; nothing more than the page has for now and given time. */
export function choiceQuery(choice: LidChoice): string {
  if (choice.kind === 'now' || choice.stayMinutes === null) return ''
  const { roomId, stayMinutes, cover } = choice
  return `?${new URLSearchParams({ room: roomId, stayMinutes: String(stayMinutes), cover }).toString()}`
}

export type SeenLid = {
  readonly joint: DoubtfulJoint
  readonly place: LidPlace
  /** "In Shop after 2 h, open in work: easy, tight, easy, tight" */
  readonly words: string
  readonly other: { readonly label: string; readonly curve: readonly CurvePoint[] }
}

/** The lid as chosen, beside how it is now (or, seen now, how it was cut). Undefined where that room has no reading. */
export function seenLid(fit: Joined, choice: LidChoice): SeenLid | undefined {
  const { lid } = fit
  const place = placeOf(fit, choice)
  if (place === undefined) return undefined
  const isNow = choice.kind === 'now'
  const joint = jointAt(lid.joint, place)
  const beside = isNow ? { ...lid.joint.cut, doubtPct: 0 } : lid.now
  return {
    joint,
    place,
    words: `${whereWords(fit, choice)}: ${feltWords(joint)}`,
    other: { label: isNow ? 'as it was cut' : 'now', curve: clearanceCurve(jointAt(lid.joint, beside)) },
  }
}

function placeOf(fit: Joined, choice: LidChoice): LidPlace | undefined {
  if (choice.kind === 'now') return fit.lid.now
  const { roomId, stayMinutes, cover } = choice
  if (stayMinutes === null) return fit.rooms.find(({ id }) => id === roomId)?.place ?? undefined
  const { stay } = fit
  const isThat = stay?.room.id === roomId && stay.stayMinutes === stayMinutes && stay.cover === cover
  return isThat ? (stay.place ?? undefined) : undefined
}

function whereWords(fit: Joined, choice: LidChoice): string {
  if (choice.kind === 'now') return 'Now'
  const name = fit.rooms.find(({ id }) => id === choice.roomId)?.name ?? 'There'
  return choice.stayMinutes === null
    ? `In ${name}, given time`
    : `In ${name} after ${formatDuration(choice.stayMinutes)}, ${coverWords[choice.cover]}`
}

/** As the trade tells it: with the grain lined up and at each quarter turn on. */
function feltWords(joint: DoubtfulJoint): string {
  const felt = (angleDeg: number) =>
    feelWords[feelOfCut(clearanceExactMm(joint, angleDeg), joint.clearanceMm)]
  const [one, other] = [felt(0), felt(90)]
  return one === other ? `${one} all the way round` : [one, other, one, other].join(', ')
}

/** "Its wood at about 9.4 % MC, its lid at 10.2 % MC; it was cut at 8.9 % MC." */
export function woodWords({ lid }: Joined, place: LidPlace): string {
  const lidWords =
    Math.abs(place.lidMcPct - place.ringMcPct) < 0.05 ? '' : `, its lid at about ${formatEmc(place.lidMcPct)}`
  const cut = lid.isCutAssumed
    ? 'nobody has said when it was cut, so it counts from now'
    : `the joint was cut at about ${formatEmc(lid.joint.cut.ringMcPct)}`
  return `The wood at its joint stands at about ${formatEmc(place.ringMcPct)}${lidWords}; ${cut}.`
}
