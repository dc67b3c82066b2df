import { Fragment } from 'react'

export type TextPart = { text: string; strong: boolean }

/** A sentence in parts, those that matter in semibold. A plain string is one part. */
export function RichText({ parts }: { parts: string | readonly TextPart[] }) {
  if (typeof parts === 'string') return parts
  return parts.map((part, index) =>
    part.strong ? <strong key={index}>{part.text}</strong> : <Fragment key={index}>{part.text}</Fragment>,
  )
}
