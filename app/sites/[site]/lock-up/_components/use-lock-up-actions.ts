'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useAction } from '@/app/_components/use-action'
import type { Carry } from '@/lib/carry/carry'
import type { LockUp } from '@/lib/lock-up/lock-up'
import { answerMeans } from '@/lib/notices/answers'
import type { Notice } from '@/lib/notices/notice'

type Unlogged = { pieceIds: string[]; toRoomId: string; since: string }

/** What can be answered at lock-up, besides bringing pieces in. */
export function useLockUpActions(site: string) {
  const invalidates = [siteKey(site, 'carries'), siteKey(site, 'now'), siteKey(site, 'pieces')]
  return {
    nothingElse: useAction({
      run: ({ isNothing }: { isNothing: boolean }) =>
        apiFetch<LockUp>(`/sites/${site}/lock-up/nothing-else`, { method: 'POST', body: { isNothing } }),
      invalidates,
    }),
    close: useAction({
      run: (body: { isClosed: boolean; stayOutIds: string[] }) =>
        apiFetch<LockUp>(`/sites/${site}/lock-up/close`, { method: 'POST', body }),
      invalidates,
    }),
    /** "Going now" is asked again after a quarter of an hour; "can't" goes to the next of the house list. */
    answer: useAction({
      run: ({ noticeId, answer }: { noticeId: string; answer: 'going' | 'cant' }) =>
        apiFetch<Notice>(`/sites/${site}/notices/${noticeId}/answers`, { method: 'POST', body: { answer } }),
      invalidates: [...invalidates, siteKey(site, 'notices')],
      done: (_, { answer }) => answerMeans[answer],
    }),
    logOut: useAction({
      run: ({ since, ...what }: Unlogged, idempotencyKey) =>
        apiFetch<Carry>(`/sites/${site}/carries`, {
          method: 'POST',
          body: { ...what, cover: 'open', stayMinutes: 60, plannedAt: since, startsNow: true },
          idempotencyKey,
        }),
      invalidates,
      done: 'It is logged as out',
      errors: 'inline',
    }),
  }
}

export type LockUpActions = ReturnType<typeof useLockUpActions>
