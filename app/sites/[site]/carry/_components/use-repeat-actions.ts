'use client'

import type { z } from 'zod'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useAction } from '@/app/_components/use-action'
import type { Carry, newCarrySchema } from '@/lib/carry/carry'
import type { newRepeatSchema, Repeat, repeatChangeSchema } from '@/lib/carry/repeat'

/** What can be done to plans that come again. */
export function useRepeatActions(site: string) {
  const invalidates = [siteKey(site, 'now'), siteKey(site, 'carries')]
  const path = `/sites/${site}/repeats`
  return {
    create: useAction({
      run: (body: z.input<typeof newRepeatSchema>, idempotencyKey) =>
        apiFetch<Repeat>(path, { method: 'POST', body, idempotencyKey }),
      invalidates,
      done: (repeat) => `It is planned, ${repeat.words}`,
      errors: 'inline',
    }),
    once: useAction({
      run: (body: z.input<typeof newCarrySchema>, idempotencyKey) =>
        apiFetch<Carry>(`/sites/${site}/carries`, { method: 'POST', body, idempotencyKey }),
      invalidates,
      done: 'It is planned, and watched',
      errors: 'inline',
    }),
    change: useAction({
      run: (asked: { repeatId: string; version: number; change: z.input<typeof repeatChangeSchema> }) =>
        apiFetch<Repeat>(`${path}/${asked.repeatId}`, {
          method: 'PATCH',
          body: asked.change,
          ifMatch: asked.version,
        }),
      invalidates,
    }),
    end: useAction({
      run: ({ repeatId, version }: { repeatId: string; version: number }) =>
        apiFetch<undefined>(`${path}/${repeatId}`, { method: 'DELETE', ifMatch: version }),
      invalidates,
      done: 'Ended. It can be undone for a day',
    }),
    restore: useAction({
      run: ({ repeatId }: { repeatId: string }) =>
        apiFetch<Repeat>(`${path}/${repeatId}/restore`, { method: 'POST' }),
      invalidates,
    }),
  }
}
