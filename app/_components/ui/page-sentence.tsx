import type { ReactNode } from 'react'
import { RichText, type TextPart } from './rich-text'

type PageSentenceProps = {
  /** The sentence in parts, or a plain string. */
  parts?: string | readonly TextPart[]
  /** Or its own markup, with its figures in `<strong>`. */
  children?: ReactNode
  /** A few words above: what the page is about. */
  above?: ReactNode
}

/** The sentence that opens a page, made from the data, the most urgent thing first. The page's only `h1`. */
export function PageSentence({ parts, children, above }: PageSentenceProps) {
  return (
    <div className="px-4 sm:px-0">
      {above ? (
        <p className="mb-1 flex items-center gap-2 text-label font-semibold text-ink-soft">{above}</p>
      ) : null}
      <h1 className="max-w-[60rem] text-sentence-phone text-pretty sm:text-sentence">
        {parts === undefined ? children : <RichText parts={parts} />}
      </h1>
    </div>
  )
}
