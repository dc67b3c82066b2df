'use client'

import { type RefObject, useLayoutEffect, useRef, useState } from 'react'

/** The width that a figure has, in px; `guess` until the browser has laid it out. */
export function useWidth<Element extends HTMLElement>(guess: number): [RefObject<Element | null>, number] {
  const ref = useRef<Element>(null)
  const [width, setWidth] = useState(guess)
  useLayoutEffect(() => {
    const element = ref.current
    if (!element) return
    const observer = new ResizeObserver(([entry]) => {
      const measured = Math.round(entry?.contentRect.width ?? 0)
      if (measured > 0) setWidth(measured)
    })
    observer.observe(element)
    return () => {
      observer.disconnect()
    }
  }, [])
  return [ref, width]
}
