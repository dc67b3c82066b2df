'use client'

import { useEffect, useState } from 'react'

/**
 * The present moment, moved on every `everyMs`. Starts at the instant that the server drew the page for,
 * so that both draw the same, and then follows this device's clock by what has passed since.
 */
export function useNow(serverAt: string, everyMs = 15_000): Date {
  const [now, setNow] = useState(() => new Date(serverAt))
  useEffect(() => {
    const start = Date.now()
    const base = new Date(serverAt).getTime()
    const tick = () => {
      setNow(new Date(base + Math.max(0, Date.now() - start)))
    }
    tick()
    const timer = setInterval(tick, everyMs)
    document.addEventListener('visibilitychange', tick)
    return () => {
      clearInterval(timer)
      document.removeEventListener('visibilitychange', tick)
    }
  }, [serverAt, everyMs])
  return now
}
