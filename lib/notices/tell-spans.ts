import type { Span } from './hold'
import type { Episode, KnownEpisode, NewNotice, NoticeState, RulePart } from './inputs'
import type { Rule } from './notice'

/** What a rule says of a span: the notice without what follows from the span itself. */
export type SpanWords = Omit<NewNotice, 'key' | 'rule' | 'episode'>

export interface SpanRule {
  rule: Rule
  subject: string
  spans: readonly Span[]
  /** Told of one subject no more often than this, ms. */
  atMostEveryMs?: number
  told: (span: Span) => SpanWords
  /** "Back to normal"; absent: nothing is said of it. */
  over?: (span: Span) => SpanWords
}

/** What has not been seen for so long is not told anew: nobody knows whether it still is so. A guess. */
const newsForMs = 48 * 3_600_000

/**
 * What is told of spans on record: one episode each, one notice once it has held, one more when it is back to normal.
 * A span that began and ended before anybody looked opens in the history and tells nothing. Late readings may move the
 * beginning of a span: it stays the episode that it overlaps.
 */
export function tellSpans(now: number, state: NoticeState, asked: SpanRule): RulePart {
  const known = (state.known ?? []).filter((one) => one.rule === asked.rule && one.subject === asked.subject)
  const lastToldAt = Math.max(-Infinity, ...known.map((one) => one.toldAt ?? -Infinity))
  // Each episode on record is one span at most, the earliest that it overlaps.
  const claimed = new Set<KnownEpisode>()
  const parts = asked.spans.map((span) => {
    const match = matchOf(
      span,
      known.filter((one) => !claimed.has(one)),
      now,
    )
    if (match !== undefined) claimed.add(match)
    return tellSpan(now, state, asked, span, match, lastToldAt)
  })
  return { episodes: parts.flatMap((part) => part.episodes), notices: parts.flatMap((part) => part.notices) }
}

function tellSpan(
  now: number,
  state: NoticeState,
  asked: SpanRule,
  span: Span,
  match: KnownEpisode | undefined,
  lastToldAt: number,
): RulePart {
  const { rule, subject, atMostEveryMs = 0 } = asked
  const episode: Episode = {
    rule,
    subject,
    key: match?.key ?? new Date(span.beganAt).toISOString(),
    state: 'pending',
    beganAt: match?.beganAt ?? span.beganAt,
  }
  const { key } = episode
  const noticeKey = `${rule}/${subject}/${key}`
  const wasTold = state.told.has(noticeKey) || (match !== undefined && match.toldAt !== null)
  if (span.endedAt !== null) {
    // One that the record no longer shows from its beginning was seen before, under its true name.
    if (match === undefined && span.isCut) return { episodes: [], notices: [] }
    const ended: Episode = { ...episode, state: 'over', endedAt: span.endedAt }
    if (match === undefined) return { episodes: [ended], notices: [] }
    if (!match.isOpen) return { episodes: [], notices: [] }
    if (!wasTold || asked.over === undefined) return { episodes: [ended], notices: [] }
    const over = asked.over(span)
    return {
      episodes: [ended],
      notices: [{ ...over, key: `${noticeKey}/over`, rule, episode: { rule, subject, key } }],
    }
  }
  if (wasTold) return { episodes: [{ ...episode, state: 'telling' }], notices: [] }
  const isNews = now - span.seenUntil <= newsForMs && now - lastToldAt >= atMostEveryMs
  if (span.heldAt === null || !isNews) return { episodes: [episode], notices: [] }
  const told = asked.told(span)
  return {
    episodes: [{ ...episode, state: 'telling' }],
    notices: [{ ...told, key: noticeKey, rule, episode: { rule, subject, key } }],
  }
}

/** An episode that was switched off ended when somebody did so, which may be after the next span began. */
const endSlackMs = 26 * 3_600_000

/** The episode on record that a span is: one that overlaps it, the open one before others. */
function matchOf(span: Span, known: readonly KnownEpisode[], now: number): KnownEpisode | undefined {
  const until = span.endedAt ?? now
  const isSame = ({ beganAt, isOpen, endedAt, toldAt }: KnownEpisode): boolean =>
    // One that began as this span ended is the next one.
    beganAt < until &&
    (isOpen || beganAt >= span.beganAt || (toldAt !== null && (endedAt ?? now) - endSlackMs > span.beganAt))
  const same = known.filter(isSame)
  const exact = same.find(({ beganAt }) => beganAt === span.beganAt)
  return exact ?? same.find(({ isOpen }) => isOpen) ?? same.at(-1)
}
