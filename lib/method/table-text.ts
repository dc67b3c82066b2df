import { EFFECTIVENESS_DAYS, EFFECTIVENESS_TABLE } from './published/effectiveness-table'
import { CARRIES_A_RELATIVES_FIGURE, MOVEMENT_TABLE } from './published/movement-table'
import { SALT_TABLE, SALT_TABLE_TEMPERATURES_C } from './published/salt-table'
import { AIR_POINTS, type AirQuantity } from './published/air-points'
import { STEP_FOURIERS, STEP_TABLE } from './published/step-table'
import { saltFixedPoints } from '@/lib/air/salts'
import { cylinderResponse } from '@/lib/carry/cylinder-response'
import { slabResponse } from '@/lib/carry/slab-response'
import { COUNTED_SHARE, FILM_M_PER_S } from '@/lib/follow/finish'
import { perPctFromShrinkage } from '@/lib/wood/movement'
import { agreements, airPointHere, emcByTemperature, kindWords } from './agreement'
import { figure, figureWithUnit, percent } from './figure'
import { filmEffectiveness } from './film-effectiveness'
import { formatCount } from '@/lib/format/figures'

type Column = { readonly header: string; readonly align?: 'right' }

/** A comparison as text, ready to be set: print, program, difference. */
export type ComparisonTable = {
  readonly id: string
  readonly title: string
  readonly columns: readonly Column[]
  readonly rows: readonly (readonly string[])[]
}

const right = (header: string): Column => ({ header, align: 'right' })

/** One row a table: how many values, and how far the program lies from them. */
export function summaryTable(): ComparisonTable {
  return {
    id: 'agreement',
    title: 'The program beside every table',
    columns: [
      { header: 'What' },
      { header: 'Table' },
      { header: 'Its values' },
      right('How many'),
      right('Largest difference'),
      right('Root mean square'),
      { header: 'Note' },
    ],
    rows: agreements().map((one) => [
      one.what,
      one.source,
      kindWords(one.kind),
      String(one.count),
      one.largestText,
      one.rmsText,
      one.note,
    ]),
  }
}

/** Wood Handbook Table 4-2, one table for each temperature of the print. */
export function emcTables(): readonly ComparisonTable[] {
  return emcByTemperature().map((row) => ({
    id: `emc-${String(row.temperatureF)}`,
    title: `${figureWithUnit(row.temperatureC, 1, '°C')} (${figureWithUnit(row.temperatureF, 0, '°F')}): ${String(row.count)} cells, largest ${figure(row.largest, 3)}, root mean square ${figure(row.rms, 3)}`,
    columns: [{ header: 'RH, %' }, right('Printed, % MC'), right('Here'), right('Difference')],
    rows: row.cells.map((cell) => [
      String(cell.humidityPct),
      figure(cell.printedPct, 1),
      figure(cell.herePct, 3),
      figure(cell.differencePct, 3),
    ]),
  }))
}

const AIR_WORDS: Readonly<Record<AirQuantity, { readonly name: string; readonly digits: number }>> = {
  'saturation-pressure': { name: 'Saturation pressure, Pa', digits: 2 },
  'humidity-ratio': { name: 'Humidity ratio, kg/kg', digits: 6 },
  enthalpy: { name: 'Enthalpy saturated, J/kg', digits: 0 },
  'dry-enthalpy': { name: 'Enthalpy dry, J/kg', digits: 0 },
}

function airTable(): ComparisonTable {
  return {
    id: 'air-points',
    title: 'Points of air, ASHRAE Handbook, Fundamentals (2017), ch. 1',
    columns: [{ header: 'What' }, right('°C'), right('Printed'), right('Here'), right('Difference')],
    rows: AIR_POINTS.map((point) => {
      const { name, digits } = AIR_WORDS[point.quantity]
      const here = airPointHere(point)
      return [
        name,
        figure(point.temperatureC, 0),
        figure(point.value, digits),
        figure(here, digits),
        percent(here / point.value - 1, 3),
      ]
    }),
  }
}

function movementTable(): ComparisonTable {
  return {
    id: 'movement-coefficients',
    title: 'Coefficients of Table 13-5 from the shrinkage of Table 4-3, Wood Handbook (2010)',
    columns: [
      { header: 'Wood' },
      right('Across rings, printed'),
      right('Here, across'),
      right('Along rings, printed'),
      right('Here, along'),
    ],
    rows: MOVEMENT_TABLE.map((row) => [
      CARRIES_A_RELATIVES_FIGURE.includes(row.wood) ? `${row.wood} (a relative’s in print)` : row.wood,
      figure(row.radialPerPct, 5),
      figure(perPctFromShrinkage(row.radialShrinkagePct), 5),
      figure(row.tangentialPerPct, 5),
      figure(perPctFromShrinkage(row.tangentialShrinkagePct), 5),
    ]),
  }
}

function saltTable(): ComparisonTable {
  return {
    id: 'salt-points',
    title: 'Saturated salts, Greenspan (1977), Table 2',
    columns: [{ header: 'Salt' }, right('°C'), right('Printed, % RH'), right('Here'), { header: 'Status' }],
    rows: SALT_TABLE.flatMap(({ salt, humidityPct, status }) =>
      SALT_TABLE_TEMPERATURES_C.map((temperatureC, n) => {
        const here = saltFixedPoints(temperatureC).find((point) => point.salt === salt)
        return [
          salt,
          String(temperatureC),
          figure(humidityPct[n] ?? Number.NaN, 2),
          figure(here?.humidityPct ?? Number.NaN, 2),
          status,
        ]
      }),
    ),
  }
}

function stepTable(): ComparisonTable {
  return {
    id: 'step-series',
    title: 'Fraction changed after a step, summed here from Crank’s series (printed nowhere)',
    columns: [{ header: 'Shape' }, right('Bi'), right('Fo'), right('4000 terms'), right('Here')],
    rows: STEP_TABLE.flatMap(({ shape, biot, changed }) => {
      const response = (shape === 'slab' ? slabResponse : cylinderResponse)(biot)
      return STEP_FOURIERS.map((fourier, n) => [
        shape,
        biot === Infinity ? '∞' : String(biot),
        String(fourier),
        figure(changed[n] ?? Number.NaN, 5),
        figure(response(fourier), 5),
      ])
    }),
  }
}

/** What a finish keeps out: the print, a film that stays as it was, and the same counted by half. */
export function effectivenessTable(): ComparisonTable {
  return {
    id: 'effectiveness',
    title: 'Moisture-excluding effectiveness, Wood Handbook (2010), Table 16-3',
    columns: [
      { header: 'Finish' },
      { header: 'Coats' },
      ...EFFECTIVENESS_DAYS.map((days) => ({ header: `After ${formatCount(days, 'day')}` })),
      { header: 'Status' },
    ],
    rows: EFFECTIVENESS_TABLE.map(({ finish, coats, afterDaysPct, status, film }) => [
      finish,
      String(coats),
      ...EFFECTIVENESS_DAYS.map((days, n) => {
        const printed = figureWithUnit(afterDaysPct[n] ?? Number.NaN, 0, '%')
        if (film === undefined) return printed
        const filmMPerS = FILM_M_PER_S[film]
        const whole = percent(filmEffectiveness(filmMPerS, days))
        return `${printed}, ${whole}, ${percent(filmEffectiveness(filmMPerS / COUNTED_SHARE, days))}`
      }),
      status === 'read' ? 'read' : 'second hand',
    ]),
  }
}

/** The other comparisons, value by value. */
export const detailTables = (): readonly ComparisonTable[] => [
  airTable(),
  movementTable(),
  saltTable(),
  stepTable(),
]
