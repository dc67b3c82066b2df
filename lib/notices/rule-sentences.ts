import { say, strong, type TextPart } from '@/lib/format/sentence'

type Told = {
  isSeen: boolean
  acknowledgedAt: string | null
  title: string
  urgency: 'now' | 'soon' | 'whenever'
}

/** New to this reader, and nobody has it in hand. */
export const isFresh = (notice: Pick<Told, 'isSeen' | 'acknowledgedAt'>): boolean =>
  !notice.isSeen && notice.acknowledgedAt === null

/** The sentence over the notices: how many are new, and which of them comes first. */
export function noticesHeadline(notices: readonly Told[], hasMore: boolean): TextPart[] {
  const fresh = notices.filter(isFresh)
  if (notices.length === 0) return say`You have been told nothing yet. That is good news.`
  if (fresh.length === 0) return say`You have seen everything that you were told.`
  const first =
    fresh.find((notice) => notice.urgency === 'now') ??
    fresh.find((notice) => notice.urgency === 'soon') ??
    fresh[0]
  const isOne = fresh.length === 1
  const count = strong(`${hasMore ? 'at least ' : ''}${String(fresh.length)} ${isOne ? 'notice' : 'notices'}`)
  // Its first sentence says what to do; the rest stands in the list.
  const title = strong((first?.title ?? '').replace(/\.( .*)?$/, ''))
  return isOne
    ? say`You have ${count} you haven’t seen: ${title}.`
    : say`You have ${count} you haven’t seen; the one that matters first is ${title}.`
}
