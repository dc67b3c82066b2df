/** What closes a series of weights: each adds or removes mass, or moves the piece on to another stage. */
const CLOSING_KINDS = [
  'cut',
  'oil',
  'wax',
  'label',
  'roughed',
  'near-final',
  // A joint is cut in these two, so mass goes.
  'final-fit',
  're-true',
] as const
export type ClosingKind = (typeof CLOSING_KINDS)[number]

export type SeriesEvent = { readonly kind: string; readonly at: number }
export type ClosingEvent = { readonly kind: ClosingKind; readonly at: number }

export type CurrentSeries<W> = {
  /** Since the last closing event, in order of time. */
  readonly weighings: readonly W[]
  /** What the series began with: the event that closed the one before. Absent: never closed. */
  readonly openedBy?: ClosingEvent
  /** Weighings of series that are closed. */
  readonly earlierCount: number
}

const isClosing = (event: SeriesEvent): event is ClosingEvent =>
  CLOSING_KINDS.some((kind) => kind === event.kind)

/**
 * The weighings that can be compared with each other: those since the last event that changed the mass. A weight at the
 * very instant of the event counts as taken after it, since both are put down in one go.
 * @param weighings in any order; undone ones are left out before
 * @param events of any kind, in any order; undone ones are left out before. Only those up to `now` count.
 * @param now epoch ms
 */
export function currentSeries<W extends { readonly at: number }>(
  weighings: readonly W[],
  events: readonly SeriesEvent[],
  now: number,
): CurrentSeries<W> {
  const openedBy = events
    .filter(isClosing)
    .filter((event) => event.at <= now)
    .reduce<ClosingEvent | undefined>(
      (latest, event) => (latest === undefined || event.at > latest.at ? event : latest),
      undefined,
    )
  const since = openedBy?.at ?? -Infinity
  const current = weighings.filter((weighing) => weighing.at >= since && weighing.at <= now)
  return {
    weighings: current.sort((a, b) => a.at - b.at),
    ...(openedBy === undefined ? {} : { openedBy: { kind: openedBy.kind, at: openedBy.at } }),
    earlierCount: weighings.filter((weighing) => weighing.at < since).length,
  }
}
