import type { PlaceCover } from '@/lib/pieces/piece'
import {
  type AirFrom,
  type AirStep,
  copyState,
  correctRing,
  evenState,
  type PieceFilter,
  stepWood,
  type WoodState,
} from './wood-state'

/** A stay in a room, as the place history has it. */
export type Stay = {
  readonly roomId: number
  readonly fromAt: Date
  readonly toAt: Date | null
  readonly cover: PlaceCover
}

/** Hourly air of a room, by the hour's start in epoch ms; hours without a reading are left out. */
export type RoomHours = ReadonlyMap<number, { readonly emcPct: number; readonly temperatureC: number }>

export type RoomRecordOf = (roomId: number) =>
  | {
      readonly hours: RoomHours
      /** Over its own last twelve months: stands in for hours that are not known at all. */
      readonly emcPctMean: number | null
    }
  | undefined

export const HOUR_MS = 3_600_000
/** Air of unknown temperature: between a house and a shop. Status: guess. */
const UNKNOWN_TEMPERATURE_C = 15
/** How far back a room is searched for the last air known before a gap. */
const HELD_HOURS = 72

const hourOf = (at: number): number => Math.floor(at / HOUR_MS) * HOUR_MS

function lastKnown(hours: RoomHours, at: number) {
  for (let back = 1; back <= HELD_HOURS; back += 1) {
    const air = hours.get(at - back * HOUR_MS)
    if (air !== undefined) return air
  }
  return undefined
}

/**
 * The air that a piece met, hour by hour, each hour cut where it changed its place or its cover.
 * @param stays oldest first
 * @param fromMs up to but without `untilMs`, epoch ms
 * @returns steps from the first moment at which it was anywhere; a gap holds the last air known of the room (its own
 *   mean beyond three days), and is marked, so that it widens the doubt
 */
export function airsOf(
  stays: readonly Stay[],
  roomOf: RoomRecordOf,
  fromMs: number,
  untilMs: number,
): AirFrom[] {
  return stays.flatMap((stay) => {
    const record = roomOf(stay.roomId)
    const airs: AirFrom[] = []
    const end = Math.min(stay.toAt?.getTime() ?? untilMs, untilMs)
    let at = Math.max(stay.fromAt.getTime(), fromMs)
    while (at < end) {
      const hourAt = hourOf(at)
      const known = record?.hours.get(hourAt)
      const air = known ?? (record === undefined ? undefined : lastKnown(record.hours, hourAt))
      const emcPct = air?.emcPct ?? record?.emcPctMean ?? null
      if (emcPct !== null)
        airs.push({
          at,
          emcPct,
          temperatureC: air?.temperatureC ?? UNKNOWN_TEMPERATURE_C,
          cover: stay.cover,
          isKnown: known !== undefined,
        })
      at = hourAt + HOUR_MS
    }
    return airs
  })
}

/** Steps a piece through airs, from one moment to another; the last air holds to the end. */
export function stepThrough(
  filter: PieceFilter,
  state: WoodState,
  airs: readonly AirFrom[],
  fromMs: number,
  untilMs: number,
  diffusionFactor: number,
): void {
  airs.forEach((air, n) => {
    const begin = Math.max(fromMs, air.at)
    const end = Math.min(untilMs, airs[n + 1]?.at ?? untilMs)
    if (end <= begin) return
    const step: AirStep = { ...air, hours: (end - begin) / HOUR_MS }
    stepWood(filter, state, step, diffusionFactor)
  })
}

/** A moisture content that was measured, by weight or meter: it corrects what was reckoned. */
export type Measured = { readonly at: number; readonly mcPct: number; readonly doubtPct: number }

export type History = {
  readonly filter: PieceFilter
  readonly stays: readonly Stay[]
  readonly roomOf: RoomRecordOf
  readonly untilMs: number
  /** When it went, for a piece that is out: its wood at that moment is kept too. */
  readonly outAtMs: number | null
  /** Oldest first. */
  readonly measured: readonly Measured[]
  readonly diffusionFactor: number
  /** For how long before the record the piece is taken to have been in its first room, ms. */
  readonly beforeMs: number
}

export type Followed = {
  readonly atMs: number
  readonly state: WoodState
  readonly outAtMs: number | null
  readonly outState: WoodState | null
}

/**
 * A piece's wood, followed from the start of its record.
 * @returns undefined where nothing is known of the air that it was in
 *
 * Before its record the piece is taken to have been in its first room, which is marked as not known.
 */
export function followHistory(history: History): Followed | undefined {
  const { filter, stays, roomOf, untilMs, measured, diffusionFactor } = history
  const [first] = stays
  if (first === undefined) return undefined
  const recordMs = first.fromAt.getTime()
  const beforeMs = recordMs - history.beforeMs
  const before = airsOf(
    [{ ...first, fromAt: new Date(beforeMs), toAt: first.fromAt }],
    roomOf,
    beforeMs,
    recordMs,
  ).map((air) => ({ ...air, isKnown: false }))
  const airs = [...before, ...airsOf(stays, roomOf, recordMs, untilMs)]
  const [firstAir] = airs
  if (firstAir === undefined) return undefined
  const startPct = roomOf(first.roomId)?.emcPctMean ?? firstAir.emcPct
  const state = evenState(filter, startPct, first.cover)
  return walk(history, state, airs, { fromMs: beforeMs, untilMs, measured, diffusionFactor, filter })
}

type Walk = Pick<History, 'filter' | 'untilMs' | 'measured' | 'diffusionFactor'> & { readonly fromMs: number }

function walk(
  { outAtMs }: Pick<History, 'outAtMs'>,
  state: WoodState,
  airs: readonly AirFrom[],
  { filter, fromMs, untilMs, measured, diffusionFactor }: Walk,
): Followed {
  const stops = [
    ...measured.map((one) => ({ at: one.at, measured: one })),
    ...(outAtMs === null ? [] : [{ at: outAtMs, measured: null }]),
  ]
    .filter(({ at }) => at > fromMs && at <= untilMs)
    .toSorted((one, other) => one.at - other.at)
  let outState: WoodState | null = null
  let at = fromMs
  for (const stop of stops) {
    stepThrough(filter, state, airs, at, stop.at, diffusionFactor)
    at = stop.at
    if (stop.measured === null) outState = copyState(state)
    else correct(state, stop.measured)
  }
  stepThrough(filter, state, airs, at, untilMs, diffusionFactor)
  return { atMs: untilMs, state, outAtMs: outState === null ? null : outAtMs, outState }
}

/** Reckoning of the wood alone, ± % MC: pace and air together. Status: guess. */
const RECKONED_DOUBT_PCT = 1

/** What was measured counts by how well it is known against the reckoning. Source: the weighted mean of two doubts. */
function correct(state: WoodState, { mcPct, doubtPct }: Measured): void {
  const reckoned = Math.hypot(RECKONED_DOUBT_PCT, 1.5 * state.unknownShare)
  const share = reckoned ** 2 / (reckoned ** 2 + doubtPct ** 2)
  correctRing(state, share * (mcPct - state.ringPct))
  state.unknownShare *= 1 - share
}

/** Carries a followed piece on through the hours since, without going back over its history. */
export function followOn(
  filter: PieceFilter,
  followed: Followed,
  through: {
    readonly airs: readonly AirFrom[]
    readonly untilMs: number
    readonly outAtMs: number | null
    readonly diffusionFactor: number
  },
): Followed {
  const state = copyState(followed.state)
  const isSameOuting = followed.outState !== null && followed.outAtMs === through.outAtMs
  const walked = walk({ outAtMs: isSameOuting ? null : through.outAtMs }, state, through.airs, {
    filter,
    fromMs: followed.atMs,
    untilMs: through.untilMs,
    measured: [],
    diffusionFactor: through.diffusionFactor,
  })
  return isSameOuting ? { ...walked, outAtMs: followed.outAtMs, outState: followed.outState } : walked
}
