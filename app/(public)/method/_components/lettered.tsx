import { Fragment } from 'react'

/** Figures keep their units at the end of a line. */
const unbroken = (text: string): string =>
  text.replaceAll(/(?<=\d) (?=[°%KJ]|mm\b|kg\b|Pa\b)/g, '\u00a0').replaceAll(/(?<=%) (?=RH|MC)/g, '\u00a0')

/** Words with letters of a formula in them: "C_T" is set with its T lowered. */
export function Lettered({ text }: { text: string }) {
  return unbroken(text)
    .split(/(_[A-Za-z0-9]+)/)
    .map((part, n) =>
      part.startsWith('_') ? (
        <sub key={n} className="text-[11px] leading-none">
          {part.slice(1)}
        </sub>
      ) : (
        <Fragment key={n}>{part}</Fragment>
      ),
    )
}
