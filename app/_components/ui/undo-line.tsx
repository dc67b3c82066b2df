'use client'

import { type ReactNode, useEffect, useRef } from 'react'
import { Button } from './button'
import { Callout } from './callout'

type UndoLineProps = {
  children: ReactNode
  onUndo: () => void
  pending?: boolean
  /** Called after `seconds`; the caller takes the line away then. Without it the line stays. */
  onGone?: () => void
  seconds?: number
}

/** "224 is back in the landing cupboard, 13:09. Undo" */
export function UndoLine({ children, onUndo, pending = false, onGone, seconds = 10 }: UndoLineProps) {
  const gone = useRef(onGone)
  useEffect(() => {
    gone.current = onGone
  }, [onGone])
  useEffect(() => {
    const timer = setTimeout(() => gone.current?.(), seconds * 1000)
    return () => {
      clearTimeout(timer)
    }
  }, [seconds])
  return (
    <Callout
      tone="good"
      announce
      action={
        <Button variant="link" pending={pending} onClick={onUndo}>
          Undo
        </Button>
      }
    >
      <p>{children}</p>
    </Callout>
  )
}
