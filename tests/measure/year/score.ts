/** What a simulated year comes to, before it is put as a table. Counts add up over seeds. */

export interface ForecastErrors {
  /** Sums of absolute errors of EMC, % MC, and how many. */
  own: number
  sameAsNow: number
  n: number
}

export interface YearScore {
  weeks: number
  /** Planned carries of which some box's grade would be gone within the stay, in truth, planned 30 min ahead or more. */
  illAdvised: number
  warned: number
  /** Ill-advised too, but planned so late that nobody could be warned 30 min ahead. */
  illAdvisedLate: number
  plannedCarries: number
  /** Planned carries that were warned of at all, ill-advised or not. */
  warnedCarries: number
  forgotten: { needed: number; calledIn: number; notNeeded: number; goneBefore: number }
  checks: number
  leaves: number
  falseLeaves: number
  /** Boxes that bind within their stay although the check had said fine, and all that it had said so of. */
  fines: number
  falseFines: number
  /** Early edge over true time, of each check whose box binds within 30 days in truth; Infinity where no time was told. */
  ratios: number[]
  /** Of those checks, the ones that told an early edge, and of these the ones whose box bound before it. */
  edges: { told: number; boundBefore: number }
  notices: number
  byRule: Map<string, number>
  forecast: Map<string, ForecastErrors>
}

export const newScore = (): YearScore => ({
  weeks: 0,
  illAdvised: 0,
  warned: 0,
  illAdvisedLate: 0,
  plannedCarries: 0,
  warnedCarries: 0,
  forgotten: { needed: 0, calledIn: 0, notNeeded: 0, goneBefore: 0 },
  checks: 0,
  leaves: 0,
  falseLeaves: 0,
  fines: 0,
  falseFines: 0,
  ratios: [],
  edges: { told: 0, boundBefore: 0 },
  notices: 0,
  byRule: new Map(),
  forecast: new Map(),
})

const added = <T extends object>(one: T, other: T): T =>
  Object.fromEntries(
    Object.entries(one).map(([key, value]: [string, unknown]) => {
      const also: unknown = (other as Record<string, unknown>)[key]
      if (typeof value === 'number' && typeof also === 'number') return [key, value + also]
      if (Array.isArray(value) && Array.isArray(also)) return [key, [...value, ...also]]
      if (value instanceof Map && also instanceof Map) return [key, mapsAdded(value, also)]
      return [key, added(value as object, also as object)]
    }),
  ) as T

function mapsAdded(one: Map<unknown, unknown>, other: Map<unknown, unknown>): Map<unknown, unknown> {
  const sum = new Map(one)
  for (const [key, value] of other) {
    const before = sum.get(key)
    if (typeof value === 'number') sum.set(key, value + (typeof before === 'number' ? before : 0))
    else sum.set(key, before === undefined ? value : added(before as object, value as object))
  }
  return sum
}

/** The years of several seeds as one. */
export const pooled = (scores: readonly YearScore[]): YearScore => scores.reduce(added, newScore())
