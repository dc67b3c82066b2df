import { enthalpyKjKg } from '@/lib/air/enthalpy'
import { humidityRatio } from '@/lib/air/humidity'
import { saltFixedPoints } from '@/lib/air/salts'
import { saturationPressurePa } from '@/lib/air/saturation'
import { cylinderRoots } from '@/lib/carry/bessel'
import { cylinderResponse } from '@/lib/carry/cylinder-response'
import { transverseDiffusionM2PerS } from '@/lib/carry/diffusion'
import { slabResponse, slabRoots } from '@/lib/carry/slab-response'
import { emcPct } from '@/lib/wood/emc'
import { emcEquationPct } from '@/lib/wood/emc-equation'
import { perPctFromShrinkage } from '@/lib/wood/movement'
import { celsiusFromFahrenheit } from '@/lib/units'
import { figure, figureWithUnit, percent, scientific } from './figure'
import { AIR_POINTS, type AirPoint } from './published/air-points'
import { EMC_TABLE } from './published/emc-table'
import { CARRIES_A_RELATIVES_FIGURE, MOVEMENT_TABLE } from './published/movement-table'
import { SALT_TABLE, SALT_TABLE_TEMPERATURES_C } from './published/salt-table'
import { SLAB_HALF_TIME, STEP_FOURIERS, STEP_TABLE } from './published/step-table'

/** How far the program lies from one table, over all its values. */
export type Agreement = {
  readonly id: string
  readonly what: string
  readonly source: string
  /** `derived`: worked out for this program and printed nowhere; `recalled`: printed, but from memory here. */
  readonly kind: 'printed' | 'recalled' | 'derived'
  readonly count: number
  /** As amounts without a sign, in the unit of the table or as a share of its value. */
  readonly largest: number
  readonly rms: number
  readonly largestText: string
  readonly rmsText: string
  readonly note: string
}

export type Spread = { readonly count: number; readonly largest: number; readonly rms: number }

/** The largest difference without its sign, and the root of the mean square. */
export function spreadOf(differences: readonly number[]): Spread {
  const count = differences.length
  if (count === 0) return { count, largest: 0, rms: 0 }
  const squares = differences.reduce((sum, difference) => sum + difference * difference, 0)
  return { count, largest: Math.max(...differences.map(Math.abs)), rms: Math.sqrt(squares / count) }
}

type Facts = Pick<Agreement, 'id' | 'what' | 'source' | 'kind' | 'note'>

const agreement = (
  facts: Facts,
  differences: readonly number[],
  text: (value: number) => string,
): Agreement => {
  const spread = spreadOf(differences)
  return { ...facts, ...spread, largestText: text(spread.largest), rmsText: text(spread.rms) }
}

/** What the program gives for a printed point of air, in the unit of the print. */
export function airPointHere({ quantity, temperatureC }: AirPoint): number {
  const saturationPa = saturationPressurePa(temperatureC)
  switch (quantity) {
    case 'saturation-pressure':
      return saturationPa
    case 'humidity-ratio':
      return humidityRatio(saturationPa)
    case 'enthalpy':
      return 1000 * enthalpyKjKg(temperatureC, humidityRatio(saturationPa))
    case 'dry-enthalpy':
      return 1000 * enthalpyKjKg(temperatureC, 0)
  }
}

function airDifferences(quantities: readonly AirPoint['quantity'][]): number[] {
  return AIR_POINTS.filter((point) => quantities.includes(point.quantity)).map(
    (point) => airPointHere(point) / point.value - 1,
  )
}

const movementDifferences = (): number[] =>
  MOVEMENT_TABLE.filter(({ wood }) => !CARRIES_A_RELATIVES_FIGURE.includes(wood)).flatMap((row) => [
    perPctFromShrinkage(row.radialShrinkagePct) - row.radialPerPct,
    perPctFromShrinkage(row.tangentialShrinkagePct) - row.tangentialPerPct,
  ])

const saltDifferences = (status: 'confirmed' | 'from memory'): number[] =>
  SALT_TABLE.filter((row) => row.status === status).flatMap(({ salt, humidityPct }) =>
    humidityPct.map((printedPct, n) => {
      const points = saltFixedPoints(SALT_TABLE_TEMPERATURES_C[n] ?? Number.NaN)
      return (points.find((point) => point.salt === salt)?.humidityPct ?? Number.NaN) - printedPct
    }),
  )

const rootDifferences = (): number[] =>
  STEP_TABLE.flatMap(({ shape, biot, roots }) => {
    const found = (shape === 'slab' ? slabRoots : cylinderRoots)(biot, roots.length)
    return roots.map((root, n) => (found[n] ?? Number.NaN) - root)
  })

const stepDifferences = (): number[] =>
  STEP_TABLE.flatMap(({ shape, biot, changed }) => {
    const response = (shape === 'slab' ? slabResponse : cylinderResponse)(biot)
    return changed.map((fraction, n) => response(STEP_FOURIERS[n] ?? Number.NaN) - fraction)
  })

/** Every table that the program is held against, made by running it. */
export const agreements = (): readonly Agreement[] => [
  agreement(
    {
      id: 'emc',
      what: 'EMC, the equation',
      source: 'Wood Handbook (FPL-GTR-190, 2010), Table 4-2',
      kind: 'printed',
      note: 'Printed to 0.1. All cells that could be read; folded out below.',
    },
    EMC_TABLE.map(
      (cell) => emcEquationPct(celsiusFromFahrenheit(cell.temperatureF), cell.humidityPct) - cell.emcPct,
    ),
    (value) => figureWithUnit(value, 3, '% MC'),
  ),
  agreement(
    {
      id: 'saturation',
      what: 'Saturation pressure',
      source: 'ASHRAE Handbook, Fundamentals (2017), ch. 1, Table 3',
      kind: 'printed',
      note: 'As a share of the print. Two points lie over ice.',
    },
    airDifferences(['saturation-pressure']),
    (value) => percent(value, 3),
  ),
  agreement(
    {
      id: 'ratio',
      what: 'Humidity ratio and enthalpy',
      source: 'ASHRAE Handbook, Fundamentals (2017), ch. 1, Table 2',
      kind: 'printed',
      note: 'The print counts air as a real gas, the equations as an ideal one: that is the difference.',
    },
    airDifferences(['humidity-ratio', 'enthalpy', 'dry-enthalpy']),
    (value) => percent(value, 2),
  ),
  agreement(
    {
      id: 'movement',
      what: 'Movement for each % MC, from shrinkage',
      source: 'Wood Handbook (FPL-GTR-190, 2010), Tables 4-3 and 13-5',
      kind: 'printed',
      note: `Printed to 0.00001. ${CARRIES_A_RELATIVES_FIGURE.join(', ')} are left out: there the print carries a relative’s figure.`,
    },
    movementDifferences(),
    (value) => figure(value, 6),
  ),
  agreement(
    {
      id: 'salts',
      what: 'Saturated salts',
      source: 'Greenspan, J. Res. NBS 81A (1977), Table 2',
      kind: 'printed',
      note: 'Recalled, then confirmed by the paper’s own polynomials or a published extract.',
    },
    saltDifferences('confirmed'),
    (value) => figureWithUnit(value, 2, '% RH'),
  ),
  agreement(
    {
      id: 'salts-memory',
      what: 'Magnesium nitrate',
      source: 'Greenspan, J. Res. NBS 81A (1977), Table 2',
      kind: 'recalled',
      note: 'Both the table and the line through it are from memory, so this proves little.',
    },
    saltDifferences('from memory'),
    (value) => figureWithUnit(value, 2, '% RH'),
  ),
  agreement(
    {
      id: 'half-time',
      what: 'Slab, half way',
      source: 'Crank, The Mathematics of Diffusion (1975)',
      kind: 'recalled',
      note: 'Half of the change when D t over the whole thickness squared is 0.0492.',
    },
    [slabResponse(Infinity)(4 * SLAB_HALF_TIME) - 0.5],
    (value) => figure(value, 5),
  ),
  agreement(
    {
      id: 'roots',
      what: 'Roots of slab and cylinder',
      source: 'Crank (1975), ch. 4 and 5; worked out here',
      kind: 'derived',
      note: 'The first of each agree with his Tables 4.1 and 5.2 as remembered; the values here are not his print.',
    },
    rootDifferences(),
    (value) => scientific(value, 1),
  ),
  agreement(
    {
      id: 'steps',
      what: 'Fraction changed after a step',
      source: 'Crank (1975), ch. 4 and 5; summed here',
      kind: 'derived',
      note: 'Against 4000 terms of the series, which a finite-volume solution confirms.',
    },
    stepDifferences(),
    (value) => scientific(value, 1),
  ),
]

export type EmcRow = Spread & {
  readonly temperatureF: number
  readonly temperatureC: number
  readonly cells: readonly {
    readonly humidityPct: number
    readonly printedPct: number
    readonly herePct: number
    readonly differencePct: number
  }[]
}

/** The same comparison of EMC, cell by cell, by the temperatures of the print. */
export function emcByTemperature(): readonly EmcRow[] {
  const temperatures = [...new Set(EMC_TABLE.map((cell) => cell.temperatureF))]
  return temperatures.map((temperatureF) => {
    const temperatureC = celsiusFromFahrenheit(temperatureF)
    const cells = EMC_TABLE.filter((cell) => cell.temperatureF === temperatureF).map((cell) => {
      const herePct = emcEquationPct(temperatureC, cell.humidityPct)
      return {
        humidityPct: cell.humidityPct,
        printedPct: cell.emcPct,
        herePct,
        differencePct: herePct - cell.emcPct,
      }
    })
    return { temperatureF, temperatureC, cells, ...spreadOf(cells.map((cell) => cell.differencePct)) }
  })
}

/** Single measurements by others beside what the program gives. */
export const measuredPoints = () => [
  ...(
    [
      [20, 37, 7.3],
      [20, 83, 16.5],
    ] as const
  ).map(([temperatureC, humidityPct, measuredPct]) => ({
    what: `European ash at ${figureWithUnit(temperatureC, 0, '°C')} and ${figureWithUnit(humidityPct, 0, '% RH')}`,
    measured: figureWithUnit(measuredPct, 1, '% MC'),
    here: figureWithUnit(emcPct(temperatureC, humidityPct), 1, '% MC'),
    source: 'a timber merchant’s data sheet, read',
  })),
  {
    what: 'Diffusion across spruce at 25 °C',
    measured: `${scientific(0.94e-10, 2)} and ${scientific(1e-10, 2)} m²/s`,
    here: `${scientific(transverseDiffusionM2PerS(25, 10, 430), 2)} m²/s`,
    source:
      'Sanchez-Ferrer and Engelhardt (2026), thin sheets, across and along the rings, read; here at 10 % MC, 430 kg/m³',
  },
]

const KIND_WORDS: Readonly<Record<Agreement['kind'], string>> = {
  printed: 'printed',
  recalled: 'printed, but from memory here',
  derived: 'worked out here, printed nowhere',
}

/** How the values of a comparison were come by, in words. */
export const kindWords = (kind: Agreement['kind']): string => KIND_WORDS[kind]
