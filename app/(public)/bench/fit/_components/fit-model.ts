import type { FitQuery } from '@/lib/bench/fit'
import type { DoubtfulJoint, DoubtfulPart } from '@/lib/fit/clearance-curve'
import { feelOf, feelWords, spareWords } from '@/lib/fit/feel'
import { gradeCourse, gradeCourses, type GradeCourse } from '@/lib/fit/grade-course'
import { GRADE_FIGURES } from '@/lib/fit/grades'
import { allowedChangeAnyAngle, clearanceExactMm } from '@/lib/fit/lid-fit'
import { jointMovement, sizeChangesMm } from '@/lib/fit/piece-size'
import { movementOfKind } from '@/lib/fit/wood-kind'
import {
  formatEmc,
  formatEmcFigure,
  formatFineLength,
  formatLength,
  formatPoints,
} from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import { emcDoubtPct, emcPct } from '@/lib/wood/emc'
import { woodMovement, type WoodMovement } from '@/lib/wood/movement-class'
import { findSpecies } from '@/lib/wood/species'
import type { Twin } from '../../_components/api-twin'
import type { Fact } from '../../_components/facts'
import type { FitChoices, FitValues } from './fit-fields'

/** How finely a clearance can be measured in a shop, ± mm. Status: guess (a feeler gauge's step). */
const MEASURED_DOUBT_MM = 0.02
/** A grade stands for its clearance, half of it either way. Status: guess. */
const GRADE_SPREAD = 0.5

export type Moisture = {
  readonly cutPct: number
  readonly basePct: number
  readonly lidPct: number
  readonly doubtPct: number
}

export type BenchFit = {
  readonly choices: FitChoices
  readonly diameterMm: number
  readonly moisture: Moisture
  readonly wood: WoodMovement
  readonly lidWood: WoodMovement
} & (
  | { readonly kind: 'words'; readonly words: string }
  | {
      readonly kind: 'joint'
      readonly joint: DoubtfulJoint
      /** What to know about the kind of wood; empty for plain wood. */
      readonly kindWords: string
      /** Of the fit as it was cut, and of all of them; for a joint of one wood whose parts keep step. */
      readonly course: GradeCourse | undefined
      readonly courses: readonly GradeCourse[]
    }
)

/** What the wood was and is, from moisture contents as typed or from the two airs. */
export function moistureOf(values: FitValues, { tell, lid }: Pick<FitChoices, 'tell' | 'lid'>): Moisture {
  const isAir = tell === 'air'
  const cutPct = isAir ? emcPct(values.cutC, values.cutRh) : values.cutPct
  const basePct = isAir ? emcPct(values.nowC, values.nowRh) : values.nowPct
  return {
    cutPct,
    basePct,
    lidPct: lid === 'own' ? values.lidPct : basePct,
    doubtPct: isAir
      ? Math.hypot(emcDoubtPct(values.cutC, values.cutRh), emcDoubtPct(values.nowC, values.nowRh))
      : values.doubtPct,
  }
}

/** The clearance that is reckoned with, and how well it is known, mm. */
function clearanceOf(values: FitValues, { fit }: FitChoices): readonly [number, number] {
  if (fit === 'own') return [values.clearanceMm, MEASURED_DOUBT_MM]
  const { clearanceMm } = GRADE_FIGURES[fit]
  return [clearanceMm, Math.abs(clearanceMm) * GRADE_SPREAD]
}

/** Whether the recess would be narrower than nothing. */
export const hasNoRecess = (values: FitValues, choices: FitChoices): boolean =>
  choices.fit !== 'threaded' && values.diameterMm + clearanceOf(values, choices)[0] <= 0

const THREADED_WORDS = "Threads aren't worked out: leave them easy, try the lid, and note how it turned."

/** The whole question: which joint that is, or why none is worked out. */
export function benchFit(values: FitValues, choices: FitChoices): BenchFit {
  const wood = woodMovement(choices.wood === '' ? undefined : choices.wood)
  const lidWood = choices.lidWood === '' ? wood : woodMovement(choices.lidWood)
  const moisture = moistureOf(values, choices)
  const { diameterMm } = values
  const asked = { choices, diameterMm, moisture, wood, lidWood }
  const moves = movementOfKind(choices.kind, wood)
  if (moves.kind === 'not-worked-out') return { ...asked, kind: 'words', words: moves.words }
  if (choices.fit === 'threaded') return { ...asked, kind: 'words', words: THREADED_WORDS }
  const part = (of: WoodMovement, nowPct: number): DoubtfulPart => ({
    ...jointMovement(of, choices.grain),
    mcChangePct: nowPct - moisture.cutPct,
    mcChangeDoubtPct: moisture.doubtPct,
    movementDoubt: of.movementDoubt,
  })
  const [clearanceMm, clearanceDoubtMm] = clearanceOf(values, choices)
  const spigot = part(wood, moisture.basePct)
  const socket = part(lidWood, moisture.lidPct)
  const isOne = choices.lidWood === '' && choices.lid === 'same'
  return {
    ...asked,
    kind: 'joint',
    joint: { diameterMm, clearanceMm, clearanceDoubtMm, spigot, socket },
    kindWords: moves.words,
    course: isOne && choices.fit !== 'own' ? gradeCourse(diameterMm, spigot, choices.fit) : undefined,
    courses: isOne ? gradeCourses(diameterMm, spigot) : [],
  }
}

/** "A quarter turn on it may bind: about 0.10 mm too tight." */
export function fitSentence(fit: BenchFit, units: UnitSystem): TextPart[] {
  if (fit.kind === 'words') return say`${strong(fit.words)}`
  const [linedUpMm, quarterMm] = [0, 90].map((angleDeg) => clearanceExactMm(fit.joint, angleDeg))
  if (linedUpMm === undefined || quarterMm === undefined) return []
  const spare = spareWords(quarterMm, units)
  if (fit.joint.clearanceMm < 0) {
    return say`It is tight from the start, as a snap lid is; a quarter turn on it is ${strong(spare)}.`
  }
  if (linedUpMm < 0 && quarterMm < 0) {
    return say`It ${strong('may bind')} even with the grain lined up: ${spareWords(linedUpMm, units)}, and ${spare} a quarter turn on.`
  }
  if (quarterMm < 0) {
    return say`A quarter turn on it ${strong('may bind')}: ${spare}. With the grain lined up it is ${feelWords[feelOf(linedUpMm)]}, ${spareWords(linedUpMm, units)}.`
  }
  const linedUp = feelWords[feelOf(linedUpMm)]
  const quarter = feelWords[feelOf(quarterMm)]
  if (linedUp === quarter) return say`It is ${strong(quarter)} all the way round, ${spare} a quarter turn on.`
  return say`It is ${linedUp} with the grain lined up and ${strong(quarter)} a quarter turn on, ${spare} there.`
}

function sizeFact(
  { joint, wood, choices }: BenchFit & { kind: 'joint' },
  change: number,
  units: UnitSystem,
): Fact {
  const { grain } = choices
  const size = { grain, heightMm: TOLD_HEIGHT_MM, diameterMm: joint.diameterMm }
  const grown = sizeChangesMm(size, wood, change)
  const name = 'The joint has become'
  if (Math.abs(grown.diameterMostMm) < NOTHING_MM) return { name, figure: 'no other size' }
  const stay = grain === 'side-grain' ? ' A side-grain lid must stay lined up.' : ''
  return {
    name,
    figure: `${signed(grown.diameterMostMm, units)} ${grown.words.most}`,
    words: `${signed(grown.diameterLeastMm, units)} ${grown.words.least}; ${formatLength(TOLD_HEIGHT_MM, units)} of its height ${signed(grown.heightMm, units)}, ${grown.words.height}.${stay}`,
  }
}

const signed = (lengthMm: number, units: UnitSystem): string => {
  const text = formatFineLength(Math.abs(lengthMm), units)
  if (Math.abs(lengthMm) < NOTHING_MM) return 'hardly anything'
  return `${lengthMm < 0 ? '−' : '+'}${text}`
}

/** Less than this is no change that a maker could measure, mm. */
const NOTHING_MM = 0.025

/** Height that its change along the axis is told for, mm. */
const TOLD_HEIGHT_MM = 100

export function fitFacts(fit: BenchFit, units: UnitSystem): Fact[] {
  const { moisture, wood, choices } = fit
  const change = moisture.basePct - moisture.cutPct
  const side = change < 0 ? 'drier' : 'damper'
  const moistureFact: Fact = {
    name: 'From when it was cut',
    figure: `${formatEmcFigure(moisture.cutPct)} to ${formatEmc(moisture.basePct)}`,
    words: `${formatPoints(change)} ${side}, give or take ${formatPoints(moisture.doubtPct)} (points are % MC).${choices.tell === 'air' ? ' Where wood ends in those two airs, given time.' : ''}`,
  }
  if (fit.kind === 'words') return [moistureFact, woodFact(wood, choices.wood, 'The wood')]
  return [
    moistureFact,
    ...beforeItBinds(fit),
    ...(fit.course === undefined ? [] : [{ name: 'Its fit', figure: choices.fit, words: fit.course.words }]),
    sizeFact(fit, change, units),
    woodFact(wood, choices.wood, 'The wood'),
    ...(choices.lidWood === '' ? [] : [woodFact(fit.lidWood, choices.lidWood, "The lid's wood")]),
    ...(fit.kindWords === '' ? [] : [{ name: 'Kind of wood', figure: 'hybrid', words: fit.kindWords }]),
  ]
}

function beforeItBinds({ joint, courses }: BenchFit & { kind: 'joint' }): Fact[] {
  if (joint.clearanceMm <= 0) return []
  const name = 'Before it may bind'
  const anyAngle = allowedChangeAnyAngle(joint, 0)
  if (anyAngle === undefined) {
    return [{ name, figure: 'no limit', words: 'Moisture takes no clearance from this joint.' }]
  }
  const figure = `about ${formatPoints(anyAngle)}`
  // One wood whose parts keep step: swelling and drying take the same.
  const words =
    courses.length > 0
      ? 'Of % MC either way from when it was cut, however the lid is turned. With the grain lined up it stands far more.'
      : 'Of % MC in the part that changes more, if the two go on in the same proportion.'
  return [{ name, figure, words }]
}

function woodFact(wood: WoodMovement, slug: string, name: string): Fact {
  const species = findSpecies(slug)
  const doubt = `its movement may be ${String(Math.round(wood.movementDoubt * 100))} % more or less`
  if (species === undefined) {
    return { name, figure: 'not known', words: `Taken as one of medium movement; ${doubt}.` }
  }
  const words = wood.assumed.includes('movement')
    ? `No movement is published: that of its class stands; ${doubt}.`
    : `${species.latinName}; ${doubt}. Source: ${species.source}.`
  return { name, figure: species.commonName, words }
}

const rounded = (value: number): number => Math.round(value * 1e6) / 1e6

/** The same question for the API; none where only words are given. */
export function fitTwins(fit: BenchFit, angleDeg: number): Twin[] {
  if (fit.kind === 'words') return []
  const { joint, choices } = fit
  const { spigot, socket } = joint
  const isTold = choices.grain === 'end-grain' && findSpecies(choices.wood) !== undefined
  const query: { [Key in keyof FitQuery]: string | number } = {
    diameterMm: joint.diameterMm,
    clearanceMm: joint.clearanceMm,
    angleDeg,
    mcChangePct: rounded(spigot.mcChangePct),
    ...(isTold
      ? { species: choices.wood }
      : { tangentialPerPct: rounded(spigot.tangentialPerPct), radialPerPct: rounded(spigot.radialPerPct) }),
    ...(choices.lid === 'same' ? {} : { lidMcChangePct: rounded(socket.mcChangePct) }),
    ...(choices.lidWood === ''
      ? {}
      : {
          lidTangentialPerPct: rounded(socket.tangentialPerPct),
          lidRadialPerPct: rounded(socket.radialPerPct),
        }),
  }
  return [
    {
      path: '/bench/fit',
      query: Object.fromEntries(Object.entries(query).filter(([, v]) => v !== undefined)),
    },
  ]
}
