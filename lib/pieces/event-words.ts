import { capital } from '@/lib/format/capital'
import { formatEmc, formatFineLength, formatLength, formatMass, formatPoints } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { eventKindWords, isFitKind, type PieceEventView } from './event'
import type { FitGrade } from './piece'

const gradeWords: Readonly<Record<FitGrade, string>> = {
  suction: 'a suction lid',
  snap: 'a snap lid',
  snug: 'a snug lid',
  easy: 'an easy lid',
  loose: 'a loose lid',
  threaded: 'a threaded lid',
}

/** "Final fit, an easy lid": what happened, without when and where. */
export function eventTitle({ kind, data }: Pick<PieceEventView, 'kind' | 'data'>, units: UnitSystem): string {
  const parts = [
    capital(eventKindWords[kind]),
    data.fitGrade ? gradeWords[data.fitGrade] : '',
    typeof data.clearanceMm === 'number' ? `clearance ${formatFineLength(data.clearanceMm, units)}` : '',
    data.jointDiameterMm === undefined ? '' : `joint ${formatLength(data.jointDiameterMm, units)}`,
    data.mcPct === undefined ? '' : formatEmc(data.mcPct),
    data.ovenDryG === undefined ? '' : formatMass(data.ovenDryG, units),
  ]
  return parts.filter(Boolean).join(', ')
}

/** Two parts nearer than this are in step, points of % MC. */
const IN_STEP_PCT = 0.05

/** Of a fit: where the wood stood and how that is known. Empty for anything else. */
export function eventWood({ kind, data }: Pick<PieceEventView, 'kind' | 'data'>): string {
  if (!isFitKind(kind)) return ''
  const { ringMcPct, lidMcPct, doubtPct, basis } = data
  if (ringMcPct === undefined || lidMcPct === undefined || doubtPct === undefined)
    return 'Nothing is known of its wood then: the joint counts from its present moisture.'
  const lid = Math.abs(lidMcPct - ringMcPct) < IN_STEP_PCT ? '' : `, its lid at ${formatEmc(lidMcPct)}`
  const from =
    basis === 'month-mean' ? ': nobody followed it then, so this is its keep room’s mean of that month' : ''
  return `Its wood stood at about ${formatEmc(ringMcPct)}${lid}, give or take ${formatPoints(doubtPct)}${from}.`
}
