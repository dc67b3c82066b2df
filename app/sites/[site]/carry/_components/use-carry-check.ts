'use client'

import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import type { CarryCheckAnswer, CarryCheckRequest } from '@/lib/carry/carry-answer'

/** The carry check of what the sentence asks; asked anew when the sentence or the air changes. */
export function useCarryCheck(site: string, key: readonly unknown[], request: CarryCheckRequest | null) {
  return useQuery<CarryCheckAnswer>({
    queryKey: siteKey(site, 'carries', 'check', ...key),
    queryFn: ({ signal }) =>
      apiFetch<CarryCheckAnswer>(`/sites/${site}/carries/check`, { method: 'POST', body: request, signal }),
    enabled: request !== null,
    placeholderData: keepPreviousData,
  })
}
