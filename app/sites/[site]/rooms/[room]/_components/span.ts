import type { Role } from '@/lib/sites/permissions'

export const spans = ['day', 'month'] as const
export type Span = (typeof spans)[number]

const HOURS: Record<Span, number> = { day: 24, month: 30 * 24 }

/** Enough for every few minutes of a day, and for every hour of a month. */
const POINTS: Record<Span, number> = { day: 300, month: 760 }

/** Onlookers see whole days only, so a day has nothing to show them. */
export const spansFor = (role: Role): readonly Span[] => (role === 'onlooker' ? ['month'] : spans)

/** The stretch that the address asks for, if this reader may see it. */
export function spanOf(given: string | string[] | undefined, role: Role): Span {
  const may = spansFor(role)
  return may.find((span) => span === given) ?? may[0] ?? 'month'
}

/** The range that ends now. */
export const seriesQueryOf = (span: Span, now: Date) => ({
  from: new Date(now.getTime() - HOURS[span] * 3_600_000).toISOString(),
  to: now.toISOString(),
  points: POINTS[span],
})

export const spanTitles: Record<Span, string> = { day: 'The last 24 hours', month: 'The last 30 days' }
export const spanWords: Record<Span, string> = { day: 'Day', month: 'Month' }
