import { describe, expect, it } from 'vitest'
import { referenceRows } from '@/tests/support/reference'
import { AIR_POINTS } from './air-points'
import { EFFECTIVENESS_TABLE } from './effectiveness-table'
import { EMC_TABLE } from './emc-table'
import { MOVEMENT_TABLE } from './movement-table'
import { SALT_TABLE, SALT_TABLE_TEMPERATURES_C } from './salt-table'
import { STEP_FOURIERS, STEP_TABLE } from './step-table'

/** The tables that the page compares with hold what the reference files hold, row for row and nothing else. */
describe('published tables, against their reference files', () => {
  it('EMC, Wood Handbook Table 4-2', () => {
    expect(EMC_TABLE.map((cell) => [cell.temperatureF, cell.humidityPct, cell.emcPct])).toEqual(
      referenceRows('emc_table_4_2.csv').map((row) => [
        row.number('temp_f'),
        row.number('rh_pct'),
        row.number('emc_pct'),
      ]),
    )
  })

  it('points of air, ASHRAE, but for the volume, which nothing here works out', () => {
    const names: Record<string, string> = {
      saturation_vapour_pressure_pa: 'saturation-pressure',
      saturation_humidity_ratio_kg_kg: 'humidity-ratio',
      saturated_air_enthalpy_j_kg: 'enthalpy',
      dry_air_enthalpy_j_kg: 'dry-enthalpy',
    }
    expect(AIR_POINTS.map((point) => [point.quantity, point.temperatureC, point.value])).toEqual(
      referenceRows('ashrae_published_points.csv')
        .filter((row) => row.text('quantity') !== 'dry_air_volume_m3_kg')
        .map((row) => [names[row.text('quantity')], row.number('temp_c'), row.number('value')]),
    )
  })

  it('movement, every wood that stands in both Table 4-3 and Table 13-5', () => {
    const coefficients = new Map(
      referenceRows('dimensional_change_table_13_5.csv').map((row) => [row.text('species'), row]),
    )
    expect(
      MOVEMENT_TABLE.map((row) => [
        row.wood,
        row.radialShrinkagePct,
        row.tangentialShrinkagePct,
        row.radialPerPct,
        row.tangentialPerPct,
      ]),
    ).toEqual(
      referenceRows('shrinkage_domestic_table_4_3.csv').flatMap((row) => {
        const coefficient = coefficients.get(row.text('species'))
        if (coefficient === undefined) return []
        return [
          [
            row.text('species'),
            row.number('radial_pct'),
            row.number('tangential_pct'),
            coefficient.number('cr_per_pct'),
            coefficient.number('ct_per_pct'),
          ],
        ]
      }),
    )
  })

  it('salts, Greenspan Table 2, with how each was come by', () => {
    expect(
      SALT_TABLE.flatMap(({ salt, humidityPct, status }) =>
        humidityPct.map((value, n) => [salt, SALT_TABLE_TEMPERATURES_C[n], value, status]),
      ),
    ).toEqual(
      referenceRows('saturated_salts.csv').map((row) => [
        row.text('salt'),
        row.number('temp_c'),
        row.number('rh_pct'),
        row.text('status').startsWith('confirmed') ? 'confirmed' : 'from memory',
      ]),
    )
  })

  it('steps of the air, roots and series', () => {
    const shapeOf = (row: { shape: string; biot: number }) => [row.shape, row.biot]
    expect(STEP_TABLE.map((row) => [...shapeOf(row), ...row.roots])).toEqual(
      referenceRows('diffusion_roots.csv').map((row) => [
        row.text('shape'),
        row.number('biot'),
        ...['b1', 'b2', 'b3', 'b4', 'b5', 'b6'].map((column) => row.number(column)),
      ]),
    )
    expect(
      STEP_TABLE.flatMap((row) => row.changed.map((value, n) => [...shapeOf(row), STEP_FOURIERS[n], value])),
    ).toEqual(
      referenceRows('diffusion_series.csv').map((row) => [
        row.text('shape'),
        row.number('biot'),
        row.number('fo'),
        row.number('e'),
      ]),
    )
  })

  it('finishes, Wood Handbook Table 16-3', () => {
    expect(
      EFFECTIVENESS_TABLE.map((row) => [row.finish, row.coats, ...row.afterDaysPct, row.status]),
    ).toEqual(
      referenceRows('moisture_excluding_effectiveness.csv').map((row) => [
        row.text('finish'),
        row.number('coats'),
        row.number('day_1_pct'),
        row.number('day_7_pct'),
        row.number('day_14_pct'),
        row.text('status'),
      ]),
    )
  })
})
