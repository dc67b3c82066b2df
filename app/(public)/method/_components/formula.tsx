import type { FormulaFacts } from './formula-facts'
import { MathLines } from './math'

/** A formula: in words, in signs, and with its papers. */
export function Formula({ facts }: { facts: FormulaFacts }) {
  const papers = [
    ['Letters', facts.letters],
    ['Source', facts.source],
    ['Range', facts.range],
    ['Limits', facts.limits],
    ['Doubt', facts.doubt],
  ] as const
  return (
    <article id={`formula-${facts.id}`} className="flex scroll-mt-6 flex-col gap-3 break-inside-avoid">
      <h3 className="font-semibold">{facts.title}</h3>
      <p className="max-w-words">{facts.plain}</p>
      <MathLines lines={facts.lines} label={`${facts.title}, as a formula`} />
      <dl className="grid max-w-words gap-x-4 gap-y-1 text-label sm:grid-cols-[4.5rem_1fr]">
        {papers.slice(0, 2).map(([term, text]) => (
          <Paper key={term} term={term} text={text} />
        ))}
        <Paper term="Status" text={facts.status} />
        {papers.slice(2).map(([term, text]) => (
          <Paper key={term} term={term} text={text} />
        ))}
      </dl>
    </article>
  )
}

function Paper({ term, text }: { term: string; text: string }) {
  return (
    <div className="contents">
      <dt className="text-ink-soft max-sm:mt-1">{term}</dt>
      <dd>{text}</dd>
    </div>
  )
}
