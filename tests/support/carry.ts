import { carryCheck } from '@/lib/carry/check'
import type { CarryCheckInput, PieceFacts, VerdictCheck } from '@/lib/carry/carry-check'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { airsOf, stepThrough } from '@/lib/follow/record'
import { type AirFrom, evenState } from '@/lib/follow/wood-state'
import type { PlaceCover } from '@/lib/pieces/piece'

export const MINUTE_MS = 60_000
export const HOUR_MS = 60 * MINUTE_MS
export const NOW = Date.UTC(2026, 2, 5, 13)

/** An ash box with every size told; its hollow lid is as thick as its ring, so that the two keep step. */
export const box: PieceFacts = {
  number: '214',
  stage: 'box',
  wood: 'fraxinus-excelsior',
  woodKind: 'plain',
  grain: 'end-grain',
  spigotOn: 'base',
  lidForm: 'hollow',
  jointDiameterMm: 62,
  wallMm: 2.5,
  spigotMm: 6,
  lidMm: 8,
  lidWallMm: null,
  bodyWallMm: null,
  blankDiameterMm: null,
  endsSealed: false,
  finish: '',
  fitGrade: null,
  clearanceMm: null,
  allowanceMm: 0.15,
}

export const airAt = (emcPct: number, temperatureC = 8): CarryCheckInput['there'] => ({
  kind: 'fresh',
  at: NOW - 2 * MINUTE_MS,
  emcPct,
  temperatureC,
  humidityPct: 71,
})

/** An hour of the air that the piece was in; null where there was no reading. */
export interface HourOfAir {
  at: number
  emcPct: number | null
  temperatureC: number
  cover: PlaceCover
}

/** Hours up to a moment, all alike. */
export function hoursUntil(
  until: number,
  count: number,
  emcPct: number | null,
  cover: HourOfAir['cover'],
  temperatureC = 19,
): HourOfAir[] {
  return Array.from({ length: count }, (_, n) => ({
    at: until - (count - n) * HOUR_MS,
    emcPct,
    temperatureC,
    cover,
  }))
}

/** What a test says of a carry: the check's own input is made of it as the loader makes it of the record. */
export type Told = Pick<CarryCheckInput, 'now' | 'there' | 'startsAt' | 'stayMinutes' | 'cover'> & {
  /** Oldest first, ending at `now`; includes any time already out. */
  history: readonly HourOfAir[]
  /** For the time before the history; null: the first hour known. */
  baselineEmcPct: number | null
  cutMcPct: number | null
  cutDoubtPct: number
  /** Hours to come from `startsAt`; empty: the air there holds. */
  forecast: readonly { at: number; emcPct: number; temperatureC: number }[]
  airDoubtPct: number
}

/** The history as rooms and stays: each hour's air in a room of its own clock, the cover as told. */
function recordOf(history: readonly HourOfAir[]): AirFrom[] {
  const hours = new Map(
    history.flatMap((hour) =>
      hour.emcPct === null
        ? []
        : [
            [
              Math.floor(hour.at / HOUR_MS) * HOUR_MS,
              { emcPct: hour.emcPct, temperatureC: hour.temperatureC },
            ],
          ],
    ),
  )
  return history.flatMap((hour, n) =>
    airsOf(
      [
        {
          roomId: 1,
          fromAt: new Date(hour.at),
          toAt: new Date(history[n + 1]?.at ?? hour.at + HOUR_MS),
          cover: hour.cover,
        },
      ],
      () => ({ hours, emcPctMean: null }),
      hour.at,
      history[n + 1]?.at ?? hour.at + HOUR_MS,
    ),
  )
}

/** House at 8.5 % MC to shop at 13.6, now, for three hours, open in work, unless told otherwise. */
export function carry(over: Partial<Told> = {}, piece: Partial<PieceFacts> = {}): CarryCheckInput {
  const told: Told = {
    now: NOW,
    history: hoursUntil(NOW, 480, 8.5, 'closed'),
    baselineEmcPct: 8.5,
    cutMcPct: 8.5,
    cutDoubtPct: 0,
    there: airAt(13.6),
    forecast: [],
    startsAt: NOW,
    stayMinutes: 180,
    cover: 'open',
    airDoubtPct: 0,
    ...over,
  }
  const facts = { ...box, ...piece }
  const { filter } = woodOfPiece(facts)
  const record = recordOf(told.history)
  const before = record.filter((air) => air.at < told.startsAt)
  const startPct = told.baselineEmcPct ?? before[0]?.emcPct
  const start = startPct === undefined ? null : evenState(filter, startPct, 'closed')
  const firstAt = before[0]?.at
  if (start !== null && firstAt !== undefined)
    stepThrough(filter, start, before, firstAt, Math.min(told.startsAt, told.now), 1)
  const coming = told.forecast.map((hour) => ({ ...hour, cover: told.cover, isKnown: true }))
  const { there } = told
  const airs =
    there.kind !== 'fresh'
      ? []
      : [
          ...record.filter((air) => air.at >= told.startsAt),
          ...(coming.length > 0
            ? coming
            : [{ ...there, at: Math.max(told.startsAt, told.now), cover: told.cover, isKnown: true }]),
        ]
  return {
    now: told.now,
    piece: facts,
    start,
    cut:
      told.cutMcPct === null
        ? null
        : { ringMcPct: told.cutMcPct, lidMcPct: told.cutMcPct, doubtPct: told.cutDoubtPct },
    there,
    airs,
    airDoubtPct: told.airDoubtPct,
    pace: UNLEARNED_PACE,
    startsAt: told.startsAt,
    stayMinutes: told.stayMinutes,
    cover: told.cover,
  }
}

export type Judged = VerdictCheck

export function judged(input: CarryCheckInput): Judged {
  const check = carryCheck(input)
  if (check.kind !== 'verdict') throw new Error(`no verdict: ${check.words}`)
  return check
}

export const msAt = (at: string | null): number => (at === null ? Infinity : new Date(at).getTime())
