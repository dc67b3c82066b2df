'use client'

import { useLive } from './use-live'

/** Stands once in a site's frame and keeps its pages up to date. */
export function Live({ site }: { site: string }) {
  useLive(site)
  return null
}
