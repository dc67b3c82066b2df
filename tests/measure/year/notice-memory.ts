import type {
  Decision,
  KnownEpisode,
  NoticeAnswer,
  NoticeState,
  RoutedNotice,
  VerdictHold,
} from '@/lib/notices/inputs'

/** What deciding needs to remember from one moment to the next; in the product the database keeps it. */
export interface NoticeMemory {
  readonly state: () => NoticeState
  /** @param isLookedAt whether a rule was looked at this time: episodes of the others stay as they are */
  readonly keep: (now: number, decision: Decision, isLookedAt: (rule: string) => boolean) => void
  /** What somebody answered to a notice. */
  readonly answer: (notice: RoutedNotice, answer: NoticeAnswer['answer'], at: number) => void
}

const DAY_MS = 86_400_000
/** As long as the product's own loader looks back. */
const KEYS_MS = 8 * DAY_MS
const EPISODES_MS = 30 * DAY_MS
const ANSWERS_MS = 4 * DAY_MS

export function noticeMemory(): NoticeMemory {
  const told = new Map<string, number>()
  const known = new Map<string, KnownEpisode>()
  let holds = new Map<string, VerdictHold>()
  let answers: NoticeAnswer[] = []
  let prunedAt = 0

  const prune = (now: number): void => {
    if (now - prunedAt < DAY_MS) return
    prunedAt = now
    for (const [key, at] of told) if (now - at > KEYS_MS) told.delete(key)
    for (const [name, { endedAt }] of known)
      if (endedAt !== null && now - endedAt > EPISODES_MS) known.delete(name)
    answers = answers.filter(({ at }) => now - at <= ANSWERS_MS)
  }
  const keepEpisodes = (
    now: number,
    { episodes, notices }: Decision,
    isLookedAt: (rule: string) => boolean,
  ): void => {
    const toldNow = new Set(notices.map(({ episode }) => nameOf(episode)))
    const holding = new Set<string>()
    for (const episode of episodes) {
      const name = nameOf(episode)
      const before = known.get(name)
      const isOpen = episode.state !== 'over'
      if (isOpen) holding.add(name)
      known.set(name, {
        rule: episode.rule,
        subject: episode.subject,
        key: episode.key,
        isOpen,
        beganAt: before?.beganAt ?? episode.beganAt,
        toldAt: before?.toldAt ?? (toldNow.has(name) || episode.state === 'telling' ? now : null),
        endedAt: isOpen ? null : (episode.endedAt ?? now),
      })
    }
    for (const [name, one] of known)
      if (one.isOpen && !holding.has(name) && isLookedAt(one.rule))
        known.set(name, { ...one, isOpen: false, endedAt: now })
  }
  return {
    state: () => ({ told: new Set(told.keys()), holds, known: [...known.values()], answers }),
    keep(now, decision, isLookedAt) {
      prune(now)
      for (const { key } of decision.notices) told.set(key, now)
      keepEpisodes(now, decision, isLookedAt)
      holds = new Map(
        decision.episodes.flatMap(({ subject, key, hold }) =>
          hold === undefined ? [] : [[`${subject} ${key}`, hold] as const],
        ),
      )
    },
    answer({ episode, deliveries }, answer, at) {
      const [first] = deliveries
      if (first === undefined) return
      const { rule, subject, key: episodeKey } = episode
      answers.push({ rule, subject, episodeKey, userId: first.userId, answer, at, until: null })
    },
  }
}

const nameOf = (of: { rule: string; subject: string; key: string }): string =>
  `${of.rule} ${of.subject} ${of.key}`
