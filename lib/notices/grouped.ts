import type { Episode, NoticeState } from './inputs'
import type { Rule } from './notice'

/** Something that holds of one piece (or sensor), told together with what holds of others. */
export interface GroupSubject {
  subject: string
  /** Names the occasion, where it does not go by when it was first seen. */
  key?: string
}

export interface Grouped<T extends GroupSubject> {
  episodes: Episode[]
  /** What is told now, in one notice; empty: nothing. */
  toTell: T[]
}

/**
 * One episode for each subject for which a condition holds, told together: those that were not told of yet, and no
 * more often for the whole site than asked.
 */
export function grouped<T extends GroupSubject>(
  now: number,
  state: NoticeState,
  rule: Rule,
  subjects: readonly T[],
  atMostEveryMs: number,
): Grouped<T> {
  const known = (state.known ?? []).filter((one) => one.rule === rule)
  const lastToldAt = Math.max(-Infinity, ...known.map((one) => one.toldAt ?? -Infinity))
  const mayTell = now - lastToldAt >= atMostEveryMs
  const parts = subjects.map((subject) => {
    const own = known.filter(
      (one) => one.subject === subject.subject && (subject.key === undefined || one.key === subject.key),
    )
    const open = own.find(({ isOpen }) => isOpen)
    // With a key of its own an occasion is told once for good; else once while it lasts.
    const wasTold =
      (subject.key === undefined ? open?.toldAt : own.find(({ toldAt }) => toldAt !== null)?.toldAt) ?? null
    const isTold = wasTold !== null
    const episode: Episode = {
      rule,
      subject: subject.subject,
      key: subject.key ?? open?.key ?? new Date(now).toISOString(),
      state: isTold || mayTell ? 'telling' : 'pending',
      beganAt: open?.beganAt ?? now,
    }
    return { subject, episode, tells: !isTold && mayTell }
  })
  return {
    episodes: parts.map(({ episode }) => episode),
    toTell: parts.filter(({ tells }) => tells).map(({ subject }) => subject),
  }
}
