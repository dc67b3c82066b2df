import type { FeatureTable } from './features'
import { type HourlyRecord, type Measure, MEASURES } from './record'
import { solveDamped } from './ridge'

/** Blocks of the record that are left out in turn, so that errors are of hours that the fit has not seen. */
const BLOCKS = 6
/**
 * Share of each feature's own spread that is added to it: weeks of hours hold few spells of weather. Status: tried on
 * simulated rooms of four seeds in four seasons; between 0.03 and 0.4 the error hardly changes.
 */
const DAMPING = 0.06
/** Fewer pairs of hours than this tell nothing. */
const PAIRS_MIN = 72

/** For one lead: what each feature adds to each measure, and how far off that was on record. */
export interface LeadFit {
  readonly leadH: number
  readonly weights: { readonly [measure in Measure]: Float64Array }
  /** Errors in EMC of the hours left out in turn, % MC, sorted. */
  readonly errorsPct: Float64Array
}

export interface RecordFit {
  readonly size: number
  readonly leads: readonly LeadFit[]
}

interface Sums {
  gram: Float64Array
  sides: { [measure in Measure]: Float64Array }
  pairs: number
}

const emptySums = (size: number): Sums => ({
  gram: new Float64Array(size * size),
  sides: {
    emcPct: new Float64Array(size),
    temperatureC: new Float64Array(size),
    humidityPct: new Float64Array(size),
  },
  pairs: 0,
})

/**
 * Fits, for each lead, the change to come to what is looked at of an hour.
 * @param isTaken whether an hour counts as one that came: hours that were warmed by hand don't
 * @returns undefined where the record holds too little
 *
 * Source: ridge regression, Hoerl and Kennard, Technometrics 12 (1970), 55: biased estimation for nonorthogonal problems.
 */
export function fitRecord(
  record: HourlyRecord,
  table: FeatureTable,
  isTaken: (n: number) => boolean,
  leads: readonly number[],
): RecordFit | undefined {
  const taken = Uint8Array.from({ length: record.length }, (_, n) => Number(isTaken(n)))
  const fits: LeadFit[] = []
  for (const leadH of leads) {
    const fit = fitLead(record, table, taken, leadH)
    if (fit === undefined) return undefined
    fits.push(fit)
  }
  return { size: table.size, leads: fits }
}

function fitLead(
  record: HourlyRecord,
  table: FeatureTable,
  taken: Uint8Array,
  leadH: number,
): LeadFit | undefined {
  const { size, rows } = table
  const blocks = Array.from({ length: BLOCKS }, () => emptySums(size))
  const blockOf = (n: number) => Math.min(BLOCKS - 1, Math.floor((n * BLOCKS) / record.length))
  const isPair = (n: number) =>
    taken[n + leadH] === 1 &&
    !Number.isNaN(rows[n * size] ?? NaN) &&
    !Number.isNaN(record.emcPct[n + leadH] ?? NaN)
  for (let n = 0; n + leadH < record.length; n += 1) {
    const sums = blocks[blockOf(n)]
    if (sums !== undefined && isPair(n)) add(sums, record, table, n, leadH)
  }
  const all = emptySums(size)
  for (const block of blocks) addSums(all, block, 1)
  if (all.pairs < PAIRS_MIN) return undefined
  const [emcPct, temperatureC, humidityPct] = solve(all)
  if (emcPct === undefined || temperatureC === undefined || humidityPct === undefined) return undefined
  const without = blocks.map((block) => {
    const rest = emptySums(size)
    addSums(rest, all, 1)
    addSums(rest, block, -1)
    return rest.pairs >= PAIRS_MIN / 2 ? solve(rest)[0] : undefined
  })
  const errors: number[] = []
  for (let n = 0; n + leadH < record.length; n += 1) {
    const weights = without[blockOf(n)]
    if (weights === undefined || !isPair(n)) continue
    const told = (record.emcPct[n] ?? NaN) + dot(table, n, weights)
    errors.push((record.emcPct[n + leadH] ?? NaN) - told)
  }
  return {
    leadH,
    weights: { emcPct, temperatureC, humidityPct },
    errorsPct: Float64Array.from(errors).sort(),
  }
}

function add(sums: Sums, record: HourlyRecord, { size, rows }: FeatureTable, n: number, leadH: number): void {
  const from = n * size
  sums.pairs += 1
  for (let i = 0; i < size; i += 1) {
    const value = rows[from + i] ?? 0
    for (let j = 0; j <= i; j += 1)
      sums.gram[i * size + j] = (sums.gram[i * size + j] ?? 0) + value * (rows[from + j] ?? 0)
  }
  for (const measure of MEASURES) {
    const change = (record[measure][n + leadH] ?? NaN) - (record[measure][n] ?? NaN)
    const side = sums.sides[measure]
    for (let i = 0; i < size; i += 1) side[i] = (side[i] ?? 0) + change * (rows[from + i] ?? 0)
  }
}

function addSums(to: Sums, from: Sums, sign: number): void {
  to.pairs += sign * from.pairs
  from.gram.forEach((value, n) => (to.gram[n] = (to.gram[n] ?? 0) + sign * value))
  for (const measure of MEASURES)
    from.sides[measure].forEach((value, n) => {
      const side = to.sides[measure]
      side[n] = (side[n] ?? 0) + sign * value
    })
}

/** A feature that never moves is damped as if it did a little, so that it stays out. */
const LEAST_SPREAD = 1e-4

function solve({ gram, sides, pairs }: Sums): Float64Array[] {
  const size = sides.emcPct.length
  const damping = Float64Array.from({ length: size }, (_, n) =>
    // The first is the constant: it needs no damping but to keep the root real.
    n === 0 ? 1e-6 * pairs : DAMPING * Math.max(gram[n * size + n] ?? 0, LEAST_SPREAD * pairs),
  )
  return solveDamped(
    gram,
    damping,
    MEASURES.map((measure) => sides[measure]),
  )
}

/** The change that a fit tells from an hour on. */
export function dot({ size, rows }: FeatureTable, n: number, weights: Float64Array): number {
  let sum = 0
  for (let i = 0; i < size; i += 1) sum += (rows[n * size + i] ?? 0) * (weights[i] ?? 0)
  return sum
}
