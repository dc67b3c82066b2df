import { z } from 'zod'
import { feelOfCut, feelWords, quarterTurnWords } from '@/lib/fit/feel'
import { gradeCourses, type GradeCourse } from '@/lib/fit/grade-course'
import {
  allowedChange,
  allowedChangeAnyAngle,
  clearanceExactMm,
  clearanceFirstOrderMm,
  type Joint,
} from '@/lib/fit/lid-fit'
import { ovalOfJoint, type InPlaneMovement } from '@/lib/fit/ovality'
import { formatFineLength, formatPoints } from '@/lib/format/figures'
import { woodMovement } from '@/lib/wood/movement-class'
import { diameterMm, numberIn, perPct, refineWood, species } from './query'

const mcChangePct = numberIn(-30, 30, '% MC')

export const NO_RECESS = 'so far below 0 that no recess is left: more than the joint is wide'

export const fitQuerySchema = z
  .strictObject({
    diameterMm,
    clearanceMm: numberIn(-5, 10, 'mm'),
    angleDeg: numberIn(0, 360, 'degrees'),
    mcChangePct,
    species: species.optional(),
    tangentialPerPct: perPct.optional(),
    radialPerPct: perPct.optional(),
    lidMcChangePct: mcChangePct.optional(),
    lidTangentialPerPct: perPct.optional(),
    lidRadialPerPct: perPct.optional(),
    keepMm: numberIn(0, 10, 'mm').optional(),
  })
  .superRefine((query, context) => {
    const refuse = (path: string, message: string) => {
      context.addIssue({ code: 'custom', path: [path], message })
    }
    if (query.diameterMm + query.clearanceMm <= 0) refuse('clearanceMm', NO_RECESS)
    refineWood(query, ['tangentialPerPct', 'radialPerPct'], refuse)
    if ((query.lidTangentialPerPct === undefined) !== (query.lidRadialPerPct === undefined)) {
      const missing = query.lidRadialPerPct === undefined ? 'lidRadialPerPct' : 'lidTangentialPerPct'
      refuse(missing, 'needed: a lid of another wood has both figures')
    }
  })

export type FitQuery = z.output<typeof fitQuerySchema>

export type FitAnswer = {
  clearanceMm: number
  clearanceFirstOrderMm: number
  tangentialDiameterMm: number
  radialDiameterMm: number
  outOfRoundMm: number
  limited: boolean
  allowedMcChangePct?: number
  /** The same however the lid is turned. */
  limitedAnyAngle: boolean
  allowedAnyAngleMcChangePct?: number
  /** How it feels there, and by the quarter turn: "easy, tight, easy, tight: ...". */
  feel: string
  quarterTurn: string
  /** Grade by grade, for a joint of one wood whose parts change alike. */
  grades?: readonly GradeCourse[]
  words: string
  assumed: readonly string[]
}

/** The figures of the wood asked about: the schema has seen to it that they are there. */
export function movementOfQuery(query: {
  species?: string | undefined
  tangentialPerPct?: number | undefined
  radialPerPct?: number | undefined
}): InPlaneMovement & { assumed: readonly string[] } {
  const { tangentialPerPct, radialPerPct } = query
  if (tangentialPerPct !== undefined && radialPerPct !== undefined) {
    return { tangentialPerPct, radialPerPct, assumed: [] }
  }
  return woodMovement(query.species)
}

/** How a lid of those sizes fits once its moisture content has changed, turned by an angle. */
export function fitAnswer(query: FitQuery): FitAnswer {
  const movement = movementOfQuery(query)
  const socketMovement: InPlaneMovement =
    query.lidTangentialPerPct !== undefined && query.lidRadialPerPct !== undefined
      ? { tangentialPerPct: query.lidTangentialPerPct, radialPerPct: query.lidRadialPerPct }
      : movement
  const joint: Joint = {
    diameterMm: query.diameterMm,
    clearanceMm: query.clearanceMm,
    spigot: { ...movement, mcChangePct: query.mcChangePct },
    socket: { ...socketMovement, mcChangePct: query.lidMcChangePct ?? query.mcChangePct },
  }
  const clearanceMm = clearanceExactMm(joint, query.angleDeg)
  const keepMm = query.keepMm ?? 0
  const allowed = allowedChange(joint, query.angleDeg, keepMm)
  const allowedAnyAngle = allowedChangeAnyAngle(joint, keepMm)
  return {
    clearanceMm,
    clearanceFirstOrderMm: clearanceFirstOrderMm(joint, query.angleDeg),
    ...ovalOfJoint(joint.diameterMm, movement, query.mcChangePct),
    limited: allowed !== undefined,
    ...(allowed === undefined ? {} : { allowedMcChangePct: allowed }),
    limitedAnyAngle: allowedAnyAngle !== undefined,
    ...(allowedAnyAngle === undefined ? {} : { allowedAnyAngleMcChangePct: allowedAnyAngle }),
    feel: feelWords[feelOfCut(clearanceMm, joint.clearanceMm)],
    quarterTurn: quarterTurnWords(
      clearanceExactMm(joint, 0),
      clearanceExactMm(joint, 90),
      'metric',
      joint.clearanceMm,
    ),
    ...(socketMovement === movement ? { grades: gradeCourses(query.diameterMm, movement) } : {}),
    words: fitWords(clearanceMm, query.angleDeg, allowed),
    assumed: movement.assumed,
  }
}

function fitWords(clearanceMm: number, angleDeg: number, allowedPct: number | undefined): string {
  const turned = angleDeg % 180 === 0 ? 'With the grain lined up' : turnWords(angleDeg % 180)
  const fit =
    clearanceMm < 0
      ? `the lid may bind: it is about ${formatFineLength(-clearanceMm)} too tight`
      : `the lid should still turn, with about ${formatFineLength(clearanceMm)} to spare`
  if (allowedPct === undefined) return `${turned} ${fit}. At this angle moisture takes no clearance.`
  return `${turned} ${fit}. At this angle it allows about ${formatPoints(allowedPct)} of % MC either way.`
}

const turnWords = (angleDeg: number): string =>
  angleDeg === 90 ? 'Turned a quarter,' : `Turned ${String(angleDeg)} degrees,`
