import { carryCheck } from '@/lib/carry/check'
import type { CarryCheckInput, HourOfAir, PieceCheck, PieceFacts } from '@/lib/carry/carry-check'

export const MINUTE_MS = 60_000
export const HOUR_MS = 60 * MINUTE_MS
export const NOW = Date.UTC(2026, 2, 5, 13)

/** An ash box with every size told. */
export const box: PieceFacts = {
  number: '214',
  stage: 'box',
  wood: 'fraxinus-excelsior',
  woodKind: 'plain',
  grain: 'end-grain',
  spigotOn: 'base',
  lidForm: 'plug',
  jointDiameterMm: 62,
  wallMm: 2.5,
  spigotMm: 6,
  lidMm: 8,
  bodyWallMm: null,
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

/** House at 8.5 % MC to shop at 13.6, now, for three hours, open in work, unless told otherwise. */
export function carry(over: Partial<CarryCheckInput> = {}, piece: Partial<PieceFacts> = {}): CarryCheckInput {
  return {
    now: NOW,
    piece: { ...box, ...piece },
    history: hoursUntil(NOW, 480, 8.5, 'closed'),
    baselineEmcPct: 8.5,
    cutMcPct: 8.5,
    there: airAt(13.6),
    forecast: [],
    startsAt: NOW,
    stayMinutes: 180,
    cover: 'open',
    ...over,
  }
}

export type Judged = Extract<PieceCheck, { kind: 'verdict' }>

export function judged(input: CarryCheckInput): Judged {
  const check = carryCheck(input)
  if (check.kind !== 'verdict') throw new Error(`no verdict: ${check.words}`)
  return check
}

export const msAt = (at: string | null): number => (at === null ? Infinity : new Date(at).getTime())
