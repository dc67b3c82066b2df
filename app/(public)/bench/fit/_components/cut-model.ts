import type { Field } from '@/lib/bench/fields'
import { fitAnswers, type FitAnswer } from '@/lib/fit/fit-answers'
import { fitCheck, type FitCheck, type FitCheckInput } from '@/lib/fit/fit-check'
import { fitCheckWords, type FitCheckWords } from '@/lib/fit/fit-check-words'
import { jointMovement } from '@/lib/fit/piece-size'
import type { FitGrade } from '@/lib/pieces/piece'
import type { UnitSystem } from '@/lib/sites/site'
import { woodMovement } from '@/lib/wood/movement-class'
import type { FitChoices } from './fit-fields'

const moisture = (label: string, start: string) =>
  ({ label, kind: 'moisture', min: 0, max: 30, start }) as const

export const cutFields = {
  blankPct: moisture('Moisture content of the piece before cutting', '10.6'),
  blankDoubtPct: moisture('Doubt of that moisture content', '0.5'),
  yearLowPct: moisture('Driest of the year', '8.6'),
  yearHighPct: moisture('Dampest of the year', '10.6'),
} as const satisfies Record<string, Field>

export type CutField = keyof typeof cutFields

export const wantedGrades = [
  'suction',
  'snap',
  'snug',
  'easy',
  'loose',
] as const satisfies readonly FitGrade[]
export type WantedGrade = (typeof wantedGrades)[number]

export type BenchCut = {
  readonly input: FitCheckInput
  readonly check: FitCheck
  readonly words: FitCheckWords
  readonly answers: readonly FitAnswer[]
}

/**
 * May it be cut today? The wood and the joint are those of the sentence above.
 * @returns undefined where the year ends drier than it begins: then there is nothing to judge against
 */
export function benchCut(
  values: Readonly<Record<CutField, number>>,
  diameterMm: number,
  choices: FitChoices,
  grade: WantedGrade,
  units: UnitSystem,
): BenchCut | undefined {
  const { blankPct, blankDoubtPct, yearLowPct, yearHighPct } = values
  if (yearHighPct < yearLowPct) return undefined
  const wood = woodMovement(choices.wood === '' ? undefined : choices.wood)
  const input: FitCheckInput = {
    mcPct: blankPct,
    mcDoubtPct: blankDoubtPct,
    target: {
      basis: 'home',
      middleMcPct: (yearLowPct + yearHighPct) / 2,
      lowMcPct: yearLowPct,
      highMcPct: yearHighPct,
      months: 12,
    },
    diameterMm,
    movement: jointMovement(wood, choices.grain),
    movementDoubt: wood.movementDoubt,
    grade,
    woodKind: choices.kind,
  }
  const check = fitCheck(input)
  const assumed = choices.lidWood === '' ? [] : ['Base and lid are taken to be of the first wood.']
  return {
    input,
    check,
    words: fitCheckWords(input, check, units, assumed),
    answers: check.kind === 'verdict' ? fitAnswers(input, check, units) : [],
  }
}
