'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useAction } from '@/app/_components/use-action'
import type { z } from 'zod'
import type { newEventSchema, PieceEventView } from '@/lib/pieces/event'

export type EventInput = z.input<typeof newEventSchema>

/** What can be entered in a piece's record, and taken back. */
export function usePieceRecord(site: string, pieceId: string) {
  const base = `/sites/${site}/pieces/${pieceId}`
  const invalidates = [siteKey(site, 'pieces'), siteKey(site, 'now'), siteKey(site, 'carries')]
  return {
    enter: useAction({
      run: (body: EventInput, idempotencyKey) =>
        apiFetch<PieceEventView>(`${base}/events`, { method: 'POST', body, idempotencyKey }),
      invalidates,
      errors: 'inline',
    }),
    setUndone: useAction({
      run: ({ what, id, isUndone }: { what: 'events' | 'outcomes'; id: string; isUndone: boolean }) =>
        apiFetch<unknown>(`${base}/${what}/${id}/${isUndone ? 'undo' : 'restore'}`, { method: 'POST' }),
      invalidates,
    }),
  }
}
