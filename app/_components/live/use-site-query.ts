'use client'

import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { apiFetch } from '../api'
import { type Area, siteKey } from './site-keys'

type SiteQuery<Answer> = {
  site: string
  area: Area
  /** What tells this query from others of its area: an id, the filters. */
  key?: readonly unknown[]
  /** The address under `/sites/{site}`, such as `/now`. */
  path: string
  /** What the server read for the first drawing. */
  initial?: Answer
  enabled?: boolean
  /** Keep showing the last answer while another key is being fetched. */
  keepLast?: boolean
}

/** Figures of a site: drawn at once from what the server read, fetched again on a change and once a minute. */
export function useSiteQuery<Answer>({
  site,
  area,
  key = [],
  path,
  initial,
  enabled = true,
  keepLast = false,
}: SiteQuery<Answer>) {
  return useQuery<Answer>({
    queryKey: siteKey(site, area, ...key),
    queryFn: ({ signal }) => apiFetch<Answer>(`/sites/${site}${path}`, { signal }),
    initialData: initial,
    placeholderData: keepLast ? keepPreviousData : undefined,
    enabled,
  })
}
