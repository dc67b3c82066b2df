import type { Field } from '@/lib/bench/fields'
import type { FitGrade, Grain, WoodKind } from '@/lib/pieces/piece'

const temperature = (label: string, start: string) =>
  ({ label: `Temperature ${label}`, kind: 'temperature', min: -10, max: 50, start }) as const
const humidity = (label: string, start: string) =>
  ({ label: `Humidity ${label}`, kind: 'humidity', min: 0, max: 100, start }) as const
const moisture = (label: string, start: string) =>
  ({ label, kind: 'moisture', min: 0, max: 30, start }) as const

export const fitFields = {
  diameterMm: { label: 'Joint diameter', kind: 'length', min: 1, max: 1000, start: '62' },
  clearanceMm: { label: 'Clearance as cut', kind: 'fine-length', min: -5, max: 10, start: '0.15' },
  cutPct: moisture('Moisture content when it was cut', '8.5'),
  nowPct: moisture('Moisture content now', '11'),
  lidPct: moisture('Moisture content of the lid now', '10'),
  doubtPct: moisture('Doubt of the moisture contents', '0.5'),
  cutC: temperature('where it was cut', '20.6'),
  cutRh: humidity('where it was cut', '45'),
  nowC: temperature('where it is now', '8'),
  nowRh: humidity('where it is now', '71'),
} as const satisfies Record<string, Field>

export type FitField = keyof typeof fitFields
export type FitValues = Readonly<Record<FitField, number>>

export const grains = ['end-grain', 'side-grain'] as const satisfies readonly Grain[]
export const kinds = ['plain', 'wild', 'hybrid', 'stabilised'] as const satisfies readonly WoodKind[]
export const fits = [
  'suction',
  'snap',
  'snug',
  'easy',
  'loose',
  'threaded',
  'own',
] as const satisfies readonly (FitGrade | 'own')[]
/** Moisture contents as they are, or those of two airs in which the wood has come to rest. */
export const tellings = ['mc', 'air'] as const
export const lidWays = ['same', 'own'] as const

/** What is chosen in the sentence rather than typed. */
export type FitChoices = {
  /** Latin name with hyphens; empty where the wood is not known. */
  readonly wood: string
  readonly kind: (typeof kinds)[number]
  readonly grain: (typeof grains)[number]
  readonly fit: (typeof fits)[number]
  /** Empty where the lid is of the same wood. */
  readonly lidWood: string
  readonly tell: (typeof tellings)[number]
  /** Whether the lid keeps step with the base or has a moisture content of its own. */
  readonly lid: (typeof lidWays)[number]
}

export const kindWords: Readonly<Record<FitChoices['kind'], string>> = {
  plain: 'plain grain',
  wild: 'wild grain: burr, burl, crotch, near the pith',
  hybrid: 'part of it cast resin',
  stabilised: 'stabilised with resin',
}
export const grainWords: Readonly<Record<FitChoices['grain'], string>> = {
  'end-grain': 'from base to lid',
  'side-grain': 'across the box',
}
export const fitWords: Readonly<Record<FitChoices['fit'], string>> = {
  suction: 'with suction',
  snap: 'with a snap',
  snug: 'snug',
  easy: 'easy',
  loose: 'loose',
  threaded: 'by a thread',
  own: 'with a clearance of',
}
export const tellingWords: Readonly<Record<FitChoices['tell'], string>> = {
  mc: 'at',
  air: 'at rest in air of',
}
export const lidWords: Readonly<Record<FitChoices['lid'], string>> = {
  same: 'keeps step with it',
  own: 'is at',
}

/** Fields that these choices leave out of the sentence. */
export function idleFields({ fit, tell, lid }: FitChoices): FitField[] {
  const airs = ['cutC', 'cutRh', 'nowC', 'nowRh'] as const
  const contents = ['cutPct', 'nowPct', 'doubtPct'] as const
  return [
    ...(fit === 'own' ? [] : (['clearanceMm'] as const)),
    ...(tell === 'mc' ? airs : contents),
    ...(lid === 'own' ? [] : (['lidPct'] as const)),
  ]
}
