'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useAction } from '@/app/_components/use-action'
import type { z } from 'zod'
import type { Carry, carryChangeSchema } from '@/lib/carry/carry'
import type { Cover } from '@/lib/pieces/piece'

type CarryChange = z.input<typeof carryChangeSchema>
type PiecesOf = { carryId: string; pieceIds?: string[] }

/** What can be done to a carry from wherever it is shown. */
export function useCarryActions(site: string) {
  const invalidates = [
    siteKey(site, 'now'),
    siteKey(site, 'carries'),
    siteKey(site, 'pieces'),
    siteKey(site, 'rooms'),
  ]
  const post = (carryId: string, verb: string, body?: unknown) =>
    apiFetch<Carry>(`/sites/${site}/carries/${carryId}/${verb}`, { method: 'POST', body })

  return {
    start: useAction({
      run: ({ carryId, againstAdvice, pieceIds }: PiecesOf & { againstAdvice: boolean }) =>
        post(carryId, 'start', { againstAdvice, pieceIds }),
      invalidates,
      errors: 'inline',
    }),
    bringBack: useAction({
      run: ({ carryId, pieceIds, roomId }: PiecesOf & { roomId?: string }) =>
        post(carryId, 'bring-back', { pieceIds, roomId }),
      invalidates,
    }),
    cover: useAction({
      run: ({ carryId, pieceIds, cover }: PiecesOf & { cover: Cover }) =>
        post(carryId, 'cover', { pieceIds, cover }),
      invalidates,
    }),
    change: useAction({
      run: ({ carryId, version, change }: { carryId: string; version: number; change: CarryChange }) =>
        apiFetch<Carry>(`/sites/${site}/carries/${carryId}`, {
          method: 'PATCH',
          body: change,
          ifMatch: version,
        }),
      invalidates,
      done: 'The plan is changed',
    }),
    /** From the hour that stands on the screen, so that a second press puts off once. */
    putOff: useAction({
      run: ({ carryId, from, to }: { carryId: string; from: string; to?: string }) =>
        post(carryId, 'put-off', { from, to }),
      invalidates,
    }),
    putBack: useAction({
      run: ({ carryId }: { carryId: string }) => post(carryId, 'put-back'),
      invalidates,
    }),
    skipAsk: useAction({
      run: ({ carryId, pieceId }: { carryId: string; pieceId: string }) =>
        post(carryId, 'skip-ask', { pieceId }),
      invalidates,
    }),
    callOff: useAction({
      run: ({ carryId }: { carryId: string }) => post(carryId, 'call-off'),
      invalidates,
      done: 'Called off',
    }),
    undo: useAction({
      run: ({ carryId }: { carryId: string }) => post(carryId, 'undo'),
      invalidates,
    }),
  }
}

export type CarryActions = ReturnType<typeof useCarryActions>
