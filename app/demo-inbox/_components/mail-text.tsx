import { Fragment } from 'react'

/** A mail's plain words. A web address on a line becomes a link; everything else is text and nothing but text. */
export function MailText({ text }: { text: string }) {
  return (
    <p className="mt-3 max-w-words break-words whitespace-pre-wrap">
      {text.split(/(https?:\/\/[^\s<>"]+)/).map((part, index) =>
        index % 2 === 1 ? (
          <a key={index} href={part} className="text-heart underline underline-offset-4">
            {part}
          </a>
        ) : (
          <Fragment key={index}>{part}</Fragment>
        ),
      )}
    </p>
  )
}
