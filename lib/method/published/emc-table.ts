/** Columns of the table below: relative humidity, %. */
export const EMC_TABLE_HUMIDITIES_PCT: readonly number[] = Array.from({ length: 19 }, (_, n) => 5 * (n + 1))

export type EmcTableCell = {
  readonly temperatureF: number
  readonly humidityPct: number
  readonly emcPct: number
}

/** As printed, °F and then % MC at 5, 10 … 95 % RH; a dash where the print could not be read. */
const PRINTED: readonly (readonly [number, string])[] = [
  [30, '1.4 - - - - 6.3 7.1 - 8.7 9.5 10.4 11.3 12.4 13.5 14.9 16.5 18.5 - -'],
  [40, '- 2.6 - 4.6 - 6.3 7.1 - 8.7 9.5 - 11.3 12.3 13.5 - 16.5 18.5 21.0 24.3'],
  [50, '1.4 2.6 - - 5.5 - 7.1 7.9 8.7 - 10.3 11.2 - 13.4 - 16.4 18.4 20.9 24.3'],
  [60, '1.3 2.5 3.6 4.6 5.4 6.2 - - - - - 11.1 12.1 13.3 14.6 16.2 18.2 - -'],
  [70, '1.3 2.5 3.5 - 5.4 6.2 6.9 - - 9.2 10.1 - 12.0 13.1 14.4 16.0 - 20.5 -'],
  [80, '- 2.4 3.5 4.4 5.3 - - 7.6 - - 9.9 10.8 11.7 12.9 - 15.7 17.7 20.2 23.6'],
  [90, '1.2 - 3.4 4.3 - - 6.7 - 8.1 8.9 - 10.5 - 12.6 13.9 15.4 17.3 19.8 -'],
  [100, '1.2 2.3 3.3 4.2 - 5.8 6.5 7.2 7.9 8.7 - 10.3 - 12.3 - - - 19.5 22.9'],
  [110, '1.1 2.2 3.2 4.0 4.9 - - 7.0 7.7 8.4 - 10.0 - 12.0 - 14.7 16.6 - 22.4'],
  [120, '1.1 2.1 3.0 3.9 4.7 5.4 6.1 - - 8.2 8.9 9.7 - - - 14.4 - 18.6 -'],
  [130, '- 2.0 2.9 - - 5.2 5.9 6.6 7.2 - 8.7 9.4 10.3 11.3 - 14.0 15.8 18.2 -'],
  [140, '0.9 1.9 - - 4.3 5.0 5.7 6.3 - 7.7 - 9.1 10.0 11.0 12.1 13.6 15.3 - -'],
  [150, '0.9 - 2.6 - 4.1 4.8 5.5 - 6.7 - - 8.8 9.7 10.6 11.8 - 14.9 17.2 -'],
  [160, '0.8 1.6 2.4 - 3.9 4.6 5.2 - - 7.1 7.8 - 9.3 10.3 - 12.7 - 16.7 19.9'],
  [170, '0.7 1.5 - - 3.7 4.3 4.9 - - - 7.4 8.2 9.0 9.9 - 12.3 14.0 16.2 19.3'],
  [180, '- 1.4 2.1 - 3.5 4.1 - 5.3 5.9 6.5 - 7.8 8.6 9.5 10.5 - 13.5 - -'],
  [190, '0.6 1.3 - 2.6 3.2 3.8 4.4 - 5.5 6.1 - 7.5 8.2 9.1 10.1 - - 15.1 -'],
  [200, '0.5 1.1 - 2.4 - 3.5 4.1 4.6 5.2 - - 7.1 7.8 8.7 9.7 - 12.5 14.6 -'],
]

/**
 * Moisture content of wood in equilibrium with air, % of oven-dry mass: the printed cells that could be read.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Table 4-2 (p. 4-4).
 */
export const EMC_TABLE: readonly EmcTableCell[] = PRINTED.flatMap(([temperatureF, figures]) =>
  figures
    .split(' ')
    .flatMap((figure, n) =>
      figure === '-'
        ? []
        : [{ temperatureF, humidityPct: EMC_TABLE_HUMIDITIES_PCT[n] ?? 0, emcPct: Number(figure) }],
    ),
)
