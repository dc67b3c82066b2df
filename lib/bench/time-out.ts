import { z } from 'zod'
import { jointLoss } from '@/lib/carry/joint-loss'
import { movementLogSpread } from '@/lib/carry/joint-spread'
import { timeOutInSteadyAir, type TimeOut } from '@/lib/carry/time-out'
import { TOLD_ALLOWANCE_FACTOR } from '@/lib/doubt/causes'
import { logSpreadNineInTen } from '@/lib/doubt/spread'
import { partFilter, type PartShape } from '@/lib/follow/part'
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
  | { binds: false; /** 1 in 10 would use it up by then all the same. */ minutesEarly?: number }
  | {
      binds: true
      minutesEarly: number
      minutes: number
      /** False where 1 in 10 never use it up; then there is no late edge. */
      lateBinds: boolean
      minutesLate?: number
    }
) & {
  words: string
  flags: 'oily-wood'[]
  assumed: readonly string[]
  /** Allowance used against time: the middle, and the edges within which 8 in 10 lie. */
  curve: TimeOut['curve']
}

/** How long until a joint has used up its allowance, in air that holds still. */
export function timeOutAnswer(query: TimeOutQuery): TimeOutAnswer {
  const movement = movementOfQuery(query)
  const densityKgM3 = query.densityKgM3 ?? woodMovement(query.species).densityKgM3
  const lid = lidShape(query)
  const timeOut = timeOutInSteadyAir({
    filter: {
      ring: partFilter(
        { kind: 'ring', wallMm: query.wallMm, lengthMm: query.spigotMm, grain: 'end-grain' },
        densityKgM3,
      ),
      lid: lid === undefined ? null : partFilter(lid, densityKgM3),
    },
    loss: jointLoss(query.diameterMm, movement, 'base'),
    cover: query.cover,
    allowanceMm: query.allowanceMm,
    fromMcPct: query.fromMcPct,
    toEmcPct: query.toEmcPct,
    temperatureC: query.temperatureC,
    spreads: {
      movementLog: movementLogSpread({
        assumed: query.species === undefined ? [] : woodMovement(query.species).assumed,
      }),
      allowanceLog: logSpreadNineInTen(TOLD_ALLOWANCE_FACTOR),
      airPct: 0,
      startPct: 0,
    },
  })
  const isOily = query.species !== undefined && findSpecies(query.species)?.oily === true
  return {
    ...timesOf(timeOut),
    words: timeOutWords(query, timeOut),
    flags: isOily ? ['oily-wood'] : [],
    assumed: movement.assumed,
    curve: timeOut.curve,
  }
}

function lidShape(query: TimeOutQuery): PartShape | undefined {
  if (query.lidMm !== undefined) return { kind: 'disc', thicknessMm: query.lidMm, grain: 'end-grain' }
  if (query.lidWallMm === undefined) return undefined
  return { kind: 'ring', wallMm: query.lidWallMm, lengthMm: query.spigotMm, grain: 'end-grain' }
}

function timesOf(timeOut: TimeOut) {
  if (!timeOut.binds) {
    const { minutesEarly } = timeOut
    return { binds: false as const, ...(minutesEarly === undefined ? {} : { minutesEarly }) }
  }
  const { minutesEarly, minutes, minutesLate } = timeOut
  return {
    binds: true as const,
    minutesEarly,
    minutes,
    lateBinds: minutesLate !== undefined,
    ...(minutesLate === undefined ? {} : { minutesLate }),
  }
}

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
  if (timeOut.minutesEarly === undefined) return `${air}: its fit keeps there.`
  return `${air}: by the middle of the reckoning its fit keeps there, but the doubt is wider than that. Try the lid.`
}
