'use client'

import { useEffect, useState } from 'react'
import { formatAge, formatFullMoment } from '@/lib/format/times'

type AgeProps = {
  at: string
  timeZone: string
  /** The instant that the server drew the page for: the first drawing is the same on both sides. */
  now: string
}

/** "2 min ago", kept up to date, with the whole moment in the site's zone behind it. */
export function Age({ at, timeZone, now }: AgeProps) {
  const [current, setCurrent] = useState(() => new Date(now).getTime())
  useEffect(() => {
    const tick = () => {
      setCurrent(Date.now())
    }
    tick()
    const timer = setInterval(tick, 15_000)
    return () => {
      clearInterval(timer)
    }
  }, [])
  return (
    <time dateTime={at} title={formatFullMoment(at, timeZone)}>
      {formatAge(current - new Date(at).getTime())}
    </time>
  )
}
