'use client'

import { Check, Copy } from 'lucide-react'
import { useRef, useState } from 'react'

type CopyTextProps = {
  text: string
  /** What is copied, for assistive technology: "the secret". */
  what: string
  /** A whole line of its own, in place of a word of a sentence. */
  isBlock?: boolean
  onCopied?: () => void
}

/** A text to carry elsewhere, with a button that copies it. Where the browser allows no copying, it marks the text. */
export function CopyText({ text, what, isBlock = false, onCopied }: CopyTextProps) {
  const [state, setState] = useState<'idle' | 'copied' | 'marked'>('idle')
  const holder = useRef<HTMLElement>(null)

  const copy = async () => {
    // An address without TLS other than this machine's own has no clipboard.
    if (typeof navigator.clipboard === 'undefined') {
      if (holder.current) window.getSelection()?.selectAllChildren(holder.current)
      setState('marked')
      return
    }
    await navigator.clipboard.writeText(text)
    setState('copied')
    onCopied?.()
  }

  return (
    <span
      className={
        isBlock
          ? 'flex w-full items-start justify-between gap-2 border border-dashed border-edge bg-board px-3 py-2'
          : 'inline-flex max-w-full items-center border-b-2 border-dashed border-edge pl-2'
      }
    >
      <code ref={holder} className="min-w-0 font-sans break-all select-all">
        {text}
      </code>
      <button
        type="button"
        aria-label={`Copy ${what}`}
        onClick={() => void copy()}
        className="inline-flex size-11 shrink-0 items-center justify-center text-heart sm:size-9"
      >
        {state === 'copied' ? (
          <Check aria-hidden="true" size={18} strokeWidth={1.5} />
        ) : (
          <Copy aria-hidden="true" size={18} strokeWidth={1.5} />
        )}
      </button>
      <span role="status" className="sr-only">
        {state === 'copied' ? `Copied ${what}` : state === 'marked' ? `Marked ${what}: copy it by hand` : ''}
      </span>
    </span>
  )
}
