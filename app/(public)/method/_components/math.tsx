import { createElement, type ReactElement } from 'react'
import { mathOf, type MathNode } from './math-notation'

const elementOf = ({ tag, text, children, attributes }: MathNode, key: number): ReactElement => {
  const { class: className, ...rest } = attributes ?? {}
  return createElement(tag, { key, className, ...rest }, text ?? children?.map(elementOf))
}

/** A formula as the browser's own MathML. */
const mathElement = (notation: string): ReactElement =>
  createElement(
    'math',
    { key: notation, display: 'block', alttext: notation },
    mathOf(notation).map(elementOf),
  )

type MathLinesProps = {
  /** Each a formula in the notation of `mathOf`. */
  lines: readonly string[]
  /** Of the box, which scrolls sideways by itself where a line is longer than the screen. */
  label: string
}

/** Formulas, one below another. */
export function MathLines({ lines, label }: MathLinesProps) {
  return (
    <div
      role="group"
      aria-label={label}
      tabIndex={0}
      className="method-math flex flex-col gap-3 overflow-x-auto border-l-2 border-line py-2 pl-4"
    >
      {lines.map(mathElement)}
    </div>
  )
}
