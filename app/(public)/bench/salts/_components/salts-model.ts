import type { Salt, SaltFixedPoint } from '@/lib/air/salts'
import { SALTS_MAX_C, SALTS_MIN_C } from '@/lib/air/salts'
import { saltsAnswer } from '@/lib/bench/salts'
import type { Field } from '@/lib/bench/fields'
import { say, strong, type TextPart } from '@/lib/format/sentence'

export const saltsFields = {
  temperatureC: {
    label: 'Temperature of the sealed box',
    kind: 'temperature',
    min: SALTS_MIN_C,
    max: SALTS_MAX_C,
    start: '20',
  },
} as const satisfies Record<string, Field>

/** Names as they stand on a jar. What is said of each beside its figure is common practice. */
export const saltNames: Readonly<Record<Salt, { name: string; note: string }>> = {
  LiCl: { name: 'Lithium chloride', note: 'Harmful if swallowed: keep it for those who handle such things.' },
  MgCl2: { name: 'Magnesium chloride', note: 'The low point that most people use.' },
  'Mg(NO3)2': { name: 'Magnesium nitrate', note: 'Feeds a fire: keep it from dust, rags and finishes.' },
  NaCl: { name: 'Table salt', note: 'The high point that most people use; free of additives if you can.' },
  KCl: { name: 'Potassium chloride', note: 'Sold as a salt substitute; only the pure one counts.' },
  K2SO4: { name: 'Potassium sulphate', note: 'So damp that a small leak shows.' },
}

/** None can be put away. The bodies named publish guidance on handling chemicals. */
export const saltCautions: readonly string[] = [
  'Wear eye protection and gloves, and read the label and the maker’s safety data sheet (HSE and OSHA on handling chemicals). Lithium salts are harmful if swallowed.',
  'Keep salts, boxes and spoons away from food, children and animals, and mark them: none goes back to the kitchen.',
  'No drop may touch the sensor: a wet sensor reads wrong for days, and salt ruins it.',
]

const figure = (item: SaltFixedPoint | undefined): string =>
  item === undefined ? '' : `${item.humidityPct.toFixed(1)}\u00a0%\u00a0RH`

export const saltItems = (temperatureC: number): SaltFixedPoint[] => saltsAnswer({ temperatureC }).items

/** The two salts that are easiest to come by, far enough apart to correct a sensor by. */
export function saltsSentence(items: readonly SaltFixedPoint[]): TextPart[] {
  const of = (salt: Salt) => figure(items.find((item) => item.salt === salt))
  return say`Sealed in with wet table salt, a true sensor reads ${strong(of('NaCl'))}; with wet magnesium chloride, ${strong(of('MgCl2'))}.`
}

export const saltFigure = figure
export const saltDoubt = (item: SaltFixedPoint): string => `±${item.doubtPct.toFixed(1)}\u00a0%\u00a0RH`
