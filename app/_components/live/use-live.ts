'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { areasOf, isLiveKind, type LiveKind } from './site-keys'

/** Changes that come close together are answered with one fetch. */
const GATHER_MS = 250
const RETRY_MS = 5_000

/**
 * Listens for what changes at a site while the page is seen, and has the figures that it touches fetched again.
 * What happened while it did not listen is caught up by fetching everything once the stream stands again.
 */
export function useLive(site: string): void {
  const client = useQueryClient()

  useEffect(() => {
    let source: EventSource | null = null
    let wasOpen = false
    let gathering: ReturnType<typeof setTimeout> | null = null
    let retry: ReturnType<typeof setTimeout> | null = null
    const kinds = new Set<LiveKind>()

    const fetchAgain = () => {
      gathering = null
      const areas = [...kinds].map((kind) => areasOf[kind])
      kinds.clear()
      if (areas.includes('all')) {
        void client.invalidateQueries({ queryKey: ['site', site] })
        return
      }
      for (const area of new Set(areas.flat())) {
        void client.invalidateQueries({ queryKey: ['site', site, area] })
      }
    }

    const onEvent = (event: MessageEvent<string>) => {
      const kind = kindOf(event.data)
      if (!kind) return
      kinds.add(kind)
      gathering ??= setTimeout(fetchAgain, GATHER_MS)
    }

    const open = () => {
      if (source || document.hidden) return
      source = new EventSource(`/api/v1/sites/${site}/live`)
      source.addEventListener('message', onEvent)
      source.addEventListener('change', onEvent)
      source.addEventListener('open', () => {
        if (wasOpen) void client.invalidateQueries({ queryKey: ['site', site] })
        wasOpen = true
      })
      source.addEventListener('error', () => {
        if (source?.readyState !== EventSource.CLOSED) return
        source = null
        retry ??= setTimeout(() => {
          retry = null
          open()
        }, RETRY_MS)
      })
    }

    const close = () => {
      source?.close()
      source = null
    }

    const onVisibility = () => {
      if (document.hidden) close()
      else open()
    }

    open()
    document.addEventListener('visibilitychange', onVisibility)
    return () => {
      document.removeEventListener('visibilitychange', onVisibility)
      if (gathering) clearTimeout(gathering)
      if (retry) clearTimeout(retry)
      close()
    }
  }, [client, site])
}

function kindOf(data: string): LiveKind | null {
  try {
    const parsed: unknown = JSON.parse(data)
    if (typeof parsed !== 'object' || parsed === null || !('kind' in parsed)) return null
    return isLiveKind(parsed.kind) ? parsed.kind : null
  } catch (error) {
    if (error instanceof SyntaxError) return null
    throw error
  }
}
