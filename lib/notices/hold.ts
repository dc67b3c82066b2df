/** One look at a condition: for a day or an hour. `between` is neither over the limit nor clear of it. */
export interface Sample {
  /** Epoch ms; the next sample of an unbroken record begins where this one ends. */
  at: number
  endsAt: number
  level: 'over' | 'between' | 'clear'
}

/** How many samples in a row it takes to begin, and to be over again. Counted in samples, as days differ in length. */
export interface Hold {
  over: number
  clear: number
}

/** A time for which a condition lasted. */
export interface Span {
  beganAt: number
  /** When it had lasted long enough to be told; null: not yet. */
  heldAt: number | null
  /** When it was clear again; null while it lasts. */
  endedAt: number | null
  /** The end of the last sample that counted towards it. */
  seenUntil: number
  /** It began with the record, or before it. */
  isCut: boolean
}

/**
 * The spans for which a condition lasted, from its record: it begins once it has been over its limit for some samples
 * in a row without a gap, and is over once it has been clear of it, by the hysteresis, for some in a row. Nothing in
 * between ends it, and no more does a gap: what is not known is not back to normal. The same record gives the same
 * spans, whoever looks and whenever.
 * @param samples oldest first
 * @returns oldest first; the last one may still be waiting to have lasted long enough
 */
export function heldSpans(samples: readonly Sample[], hold: Hold): Span[] {
  const spans: Span[] = []
  let open: Span | undefined
  let over = 0
  let clear = 0
  let before: Sample | undefined
  for (const sample of samples) {
    const isUnbroken = before !== undefined && sample.at <= before.endsAt + gapToleranceMs
    over = sample.level === 'over' ? (isUnbroken ? over + 1 : 1) : 0
    clear = sample.level === 'clear' ? (isUnbroken ? clear + 1 : 1) : 0
    before = sample
    if (open === undefined || (open.heldAt === null && over === 1)) {
      open =
        over > 0
          ? {
              beganAt: sample.at,
              heldAt: null,
              endedAt: null,
              seenUntil: sample.endsAt,
              isCut: sample === samples[0],
            }
          : undefined
    }
    if (open === undefined) continue
    open.seenUntil = sample.endsAt
    if (open.heldAt === null && over === 0) open = undefined
    else if (open.heldAt === null && over >= hold.over) {
      open.heldAt = sample.endsAt
      spans.push(open)
    } else if (open.heldAt !== null && clear >= hold.clear) {
      open.endedAt = sample.endsAt
      open = undefined
    }
  }
  return open?.heldAt === null ? [...spans, open] : spans
}

/** Days of a calendar fit together to the millisecond; hours of a record may be a little off. */
const gapToleranceMs = 60_000
