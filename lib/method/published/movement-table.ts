export type MovementRow = {
  readonly wood: string
  /** Shrinkage from green to oven-dry, % of the green size. Source: Table 4-3 (p. 4-6). */
  readonly radialShrinkagePct: number
  readonly tangentialShrinkagePct: number
  /** Change of size for each % MC, fraction. Source: Table 13-5 (p. 13-16). */
  readonly radialPerPct: number
  readonly tangentialPerPct: number
}

const PRINTED: readonly (readonly [string, number, number, number, number])[] = [
  ['Alder red', 4.4, 7.3, 0.00151, 0.00256],
  ['Ash black', 5.0, 7.8, 0.00172, 0.00274],
  ['Ash green', 4.6, 7.1, 0.00169, 0.00274],
  ['Ash Oregon', 4.1, 8.1, 0.00141, 0.00285],
  ['Ash pumpkin', 3.7, 6.3, 0.00126, 0.00219],
  ['Ash white', 4.9, 7.8, 0.00169, 0.00274],
  ['Aspen quaking', 3.5, 6.7, 0.00119, 0.00234],
  ['Basswood American', 6.6, 9.3, 0.0023, 0.0033],
  ['Beech American', 5.5, 11.9, 0.0019, 0.00431],
  ['Birch paper', 6.3, 8.6, 0.00219, 0.00304],
  ['Birch river', 4.7, 9.2, 0.00162, 0.00327],
  ['Birch sweet', 6.5, 9.0, 0.00256, 0.00338],
  ['Birch yellow', 7.3, 9.5, 0.00256, 0.00338],
  ['Buckeye yellow', 3.6, 8.1, 0.00123, 0.00285],
  ['Butternut', 3.4, 6.4, 0.00116, 0.00223],
  ['Cherry black', 3.7, 7.1, 0.00126, 0.00248],
  ['Chestnut American', 3.4, 6.7, 0.00116, 0.00234],
  ['Cottonwood black', 3.6, 8.6, 0.00123, 0.00304],
  ['Cottonwood eastern', 3.9, 9.2, 0.00133, 0.00327],
  ['Elm American', 4.2, 9.5, 0.00144, 0.00338],
  ['Elm cedar', 4.7, 10.2, 0.00183, 0.00419],
  ['Elm rock', 4.8, 8.1, 0.00165, 0.00285],
  ['Elm slippery', 4.9, 8.9, 0.00169, 0.00315],
  ['Elm winged', 5.3, 11.6, 0.00183, 0.00419],
  ['Hackberry', 4.8, 8.9, 0.00165, 0.00315],
  ['Hickory pecan', 4.9, 8.9, 0.00169, 0.00315],
  ['Persimmon common', 7.9, 11.2, 0.00278, 0.00403],
  ['Sassafras', 4.0, 6.2, 0.00137, 0.00216],
  ['Sweetgum', 5.3, 10.2, 0.00183, 0.00365],
  ['Sycamore American', 5.0, 8.4, 0.00172, 0.00296],
  ['Tanoak', 4.9, 11.7, 0.00169, 0.00423],
  ['Tupelo black', 5.1, 8.7, 0.00176, 0.00308],
  ['Tupelo water', 4.2, 7.6, 0.00144, 0.00267],
  ['Walnut black', 5.5, 7.8, 0.0019, 0.00274],
]

/**
 * Woods that could be read in both tables.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Tables 4-3 (shrinkage) and 13-5 (coefficients).
 */
export const MOVEMENT_TABLE: readonly MovementRow[] = PRINTED.map(
  ([wood, radialShrinkagePct, tangentialShrinkagePct, radialPerPct, tangentialPerPct]) => ({
    wood,
    radialShrinkagePct,
    tangentialShrinkagePct,
    radialPerPct,
    tangentialPerPct,
  }),
)

/** Table 13-5 prints the coefficients of a relative for these, which do not follow from their own shrinkage. */
export const CARRIES_A_RELATIVES_FIGURE: readonly string[] = ['Ash green', 'Birch sweet', 'Elm cedar']
