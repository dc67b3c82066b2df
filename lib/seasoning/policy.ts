/**
 * When a resting blank counts as ready, when it is to be weighed, and when no forecast is made. Each threshold stands
 * here with its reason and its status; none stands in a component or a query.
 */
export const dayMs = 24 * 60 * 60_000
export const weekMs = 7 * dayMs

/** Ready takes so many weights over so long. Common practice, no source: "the same three times over two months". */
export const readyWeights = 3
export const readyOverMs = 8 * weekMs

/** Weights are the same within the larger of one step of the scale and this share of the mass. Common practice. */
export const sameWeightShare = 0.003

/** MC and the home's middle count as matched within this, as two rooms do (derived: noise between two sensors). */
export const readyWithinPct = 0.7
/** And the MC is to be known this well, or the match says nothing (derived: a sensor's share alone is about 0.5). */
export const readyDoubtPctMax = 1

/** Rest after roughing and after near-final turning, for stress as much as for water. Common practice, no source. */
export const restAfterRoughingMs = 60 * dayMs
export const restAfterNearFinalMs = 14 * dayMs

/** A blank is weighed once a month; a light one on a fine scale, which shows it, every week. Common practice. */
export const weighEveryMs = 30 * dayMs
export const weighLightEveryMs = weekMs
export const lightUnderG = 100
export const fineStepG = 0.1

/** Step of a scale until told. Common practice, no source. */
export const assumedStepG = 1

/**
 * No forecast before the loss has slowed to this share of its first rate: until then the fitted end lies too high, so
 * that wood looks closer to done than it is (derived from the slab series).
 */
export const forecastBelowRateShare = 0.5
/** Nor while the end is known no better than this share of the change seen so far. A guess. */
export const forecastDoubtShareMax = 0.5

/** Ready is told as a range at least this wide, and never as a day. A guess: about as often as a maker looks. */
export const leastReadySpanMs = weekMs
/** A range that begins later than this is not told: no fit reaches so far. A guess. */
export const furthestReadyMs = 3 * 365 * dayMs

/** A meter reading is put to a weight when it was taken within this of it. A guess: wood at rest changes little. */
export const meterBesideWeightMs = 3 * dayMs

/** Drift is not corrected for when more than this share of what the wood remembers has no record. A guess. */
export const driftMissingShareMax = 0.25

/** A weight further than this from the last one, as a share of it, is asked about before it is kept. A guess: green wood
 * loses a fifth of its weight in a month at most. */
export const oddWeightShare = 0.2

/** Days of record that a room needs before its middle counts as that of a year. As for the band of a keep room. */
export const yearDaysMin = 60
