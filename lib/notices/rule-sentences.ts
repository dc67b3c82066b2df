import { say, strong, type TextPart } from '@/lib/format/sentence'
import { lastCallBeforeQuietMs, warnBeforePlannedMs, warnEveningBefore } from './policy'

type SiteTimes = { quietFrom: string; quietTo: string; lockUpAt: string }

const minutes = (ms: number): string => `${String(Math.round(ms / 60_000))} min`

/** What the product tells, in plain sentences with the values that it goes by. */
export function ruleSentences({
  quietFrom,
  quietTo,
  lockUpAt,
}: SiteTimes): { key: string; words: TextPart[] }[] {
  return [
    {
      key: 'planned-carry',
      words: say`When a finished box is about to go where it may lose its fit, tell its maker and the house list, ${strong(minutes(warnBeforePlannedMs))} before and at ${strong(warnEveningBefore)} the evening before.`,
    },
    {
      key: 'verdict-worse',
      words: say`When the verdict on a planned carry gets ${strong('worse')}, tell them again, once.`,
    },
    {
      key: 'time-nearly-out',
      words: say`When a piece that is out nears its early edge, tell the house list, ${strong('a quarter of its time')} before, 10 min at least and 60 min at most.`,
    },
    {
      key: 'time-out',
      words: say`When a piece has ${strong('reached its early edge')}, tell its maker and the house list to bring it in.`,
    },
    { key: 'lock-up', words: say`At ${strong(lockUpAt)}, lock-up, ask what is still out.` },
    {
      key: 'last-call',
      words:
        quietFrom === quietTo
          ? say`There is no last call, as there are no quiet hours.`
          : say`Ask once more, the last call, ${strong(minutes(lastCallBeforeQuietMs))} before quiet hours begin.`,
    },
    {
      key: 'sensor-silent',
      words: say`When a sensor has been silent for ${strong('6 of its usual gaps')}, 2 h at least, tell the makers; at once where a piece is out in its room.`,
    },
    {
      key: 'quiet',
      words:
        quietFrom === quietTo
          ? say`Nothing is held back: there are no quiet hours.`
          : say`From ${strong(quietFrom)} to ${strong(quietTo)}, hold everything but ${strong('a finished box that is overdue')}, told once, to its maker.`,
    },
  ]
}

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
