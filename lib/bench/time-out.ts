import { z } from 'zod'
import { timeOutInSteadyAir, USED_EARLY_OVER_MIDDLE, type LidOver, type TimeOut } from '@/lib/carry/time-out'
import { quarterTurnLossMmPerPct } from '@/lib/fit/lid-fit'
import { formatPoints } from '@/lib/format/figures'
import { formatDuration } from '@/lib/format/times'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import { woodMovement } from '@/lib/wood/movement-class'
import { findSpecies } from '@/lib/wood/species'
import { movementOfQuery } from './fit'
import { lidMm, spigotMm } from './joint'
import {
  densityKgM3,
  diameterMm,
  mcPct,
  numberIn,
  perPct,
  refineWood,
  species,
  temperatureC,
  wallMm,
} from './query'

export const timeOutQuerySchema = z
  .strictObject({
    species: species.optional(),
    densityKgM3: densityKgM3.optional(),
    tangentialPerPct: perPct.optional(),
    radialPerPct: perPct.optional(),
    diameterMm,
    wallMm,
    spigotMm,
    cover: z.enum(['open', 'lid-on', 'closed'], { error: 'open, lid-on or closed' }),
    allowanceMm: numberIn(0.01, 5, 'mm'),
    fromMcPct: mcPct,
    toEmcPct: mcPct,
    temperatureC,
    lidForm: z.enum(['plug', 'hollow'], { error: 'plug or hollow' }).optional(),
    lidMm: lidMm.optional(),
    lidWallMm: wallMm.optional(),
  })
  .superRefine((query, context) => {
    const refuse = (path: string, message: string) => {
      context.addIssue({ code: 'custom', path: [path], message })
    }
    refineWood(query, ['densityKgM3', 'tangentialPerPct', 'radialPerPct'], refuse)
    if (query.lidForm === 'plug' && query.lidMm === undefined) refuse('lidMm', 'needed for a plug lid')
    if (query.lidForm === 'hollow' && query.lidWallMm === undefined)
      refuse('lidWallMm', 'needed for a hollow lid')
    if (query.lidForm !== 'plug' && query.lidMm !== undefined) refuse('lidMm', 'goes with lidForm=plug')
    if (query.lidForm !== 'hollow' && query.lidWallMm !== undefined)
      refuse('lidWallMm', 'goes with lidForm=hollow')
  })

export type TimeOutQuery = z.output<typeof timeOutQuerySchema>

export type TimeOutAnswer = (
  { binds: false } | { binds: true; minutesEarly: number; minutes: number; minutesLate: number }
) & { words: string; flags: 'oily-wood'[]; assumed: readonly string[] }

/** How long until a joint has used up its allowance, in air that holds still. */
export function timeOutAnswer(query: TimeOutQuery): TimeOutAnswer {
  const movement = movementOfQuery(query)
  const lid = lidOfQuery(query, (query.diameterMm * (movement.tangentialPerPct + movement.radialPerPct)) / 2)
  const timeOut = timeOutInSteadyAir({
    size: { wallMm: query.wallMm, spigotMm: query.spigotMm, grain: 'end-grain' },
    densityKgM3: query.densityKgM3 ?? woodMovement(query.species).densityKgM3,
    cover: query.cover,
    lossMmPerPct: quarterTurnLossMmPerPct(query.diameterMm, movement),
    allowanceMm: query.allowanceMm,
    fromMcPct: query.fromMcPct,
    toEmcPct: query.toEmcPct,
    temperatureC: query.temperatureC,
    ...(lid === undefined ? {} : { lid }),
  })
  const isOily = query.species !== undefined && findSpecies(query.species)?.oily === true
  return {
    ...timesOf(timeOut),
    words: timeOutWords(query, timeOut),
    flags: isOily ? ['oily-wood'] : [],
    assumed: movement.assumed,
  }
}

function lidOfQuery(query: TimeOutQuery, swellMmPerPct: number): LidOver | undefined {
  if (query.lidMm !== undefined) return { form: 'plug', lidMm: query.lidMm, swellMmPerPct }
  if (query.lidWallMm !== undefined) return { form: 'hollow', wallMm: query.lidWallMm, swellMmPerPct }
  return undefined
}

function timesOf(timeOut: TimeOut) {
  if (!timeOut.binds) return { binds: false as const }
  const { minutesEarly, minutes, minutesLate } = timeOut
  return { binds: true as const, minutesEarly, minutes, minutesLate }
}

/** More than this of the allowance used in the end lies within the doubt of 1 in 10. */
const WITHIN_DOUBT = 1 / USED_EARLY_OVER_MIDDLE

function timeOutWords(query: TimeOutQuery, timeOut: TimeOut): string {
  const apart = query.toEmcPct - query.fromMcPct
  const air =
    Math.abs(apart) < noTellingDifferencePct
      ? 'There is no telling difference between that air and the wood'
      : `That air is ${formatPoints(apart)} of % MC ${apart > 0 ? 'damper' : 'drier'} than the wood`
  if (timeOut.binds) {
    const early = formatDuration(timeOut.minutesEarly)
    return `${air}: be back within about ${early}, though more likely its fit keeps for about ${formatDuration(timeOut.minutes)}.`
  }
  if (timeOut.usedInTheEnd < WITHIN_DOUBT) return `${air}: its fit keeps there.`
  return `${air}: by the middle of the reckoning its fit keeps there, but the doubt is wider than that. Try the lid.`
}
