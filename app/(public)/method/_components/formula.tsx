import type { FormulaFacts } from './formula-facts'
import { Lettered } from './lettered'
import { MathLines } from './math'

/** A formula: in words, in signs, and with its papers. */
export function Formula({ facts }: { facts: FormulaFacts }) {
  const papers = [
    ['Letters', facts.letters],
    ['Source', facts.source],
    ['Status', facts.status],
    ['Range', facts.range],
    ['Limits', facts.limits],
    ['Doubt', facts.doubt],
  ] as const
  return (
    <article id={`formula-${facts.id}`} className="flex scroll-mt-6 flex-col gap-3 break-inside-avoid">
      <h3 className="font-semibold">{facts.title}</h3>
      <p className="max-w-words">{facts.plain}</p>
      <MathLines lines={facts.lines} label={`${facts.title}, as a formula`} />
      <dl className="grid gap-x-8 gap-y-2 text-label sm:grid-cols-2">
        {papers.map(([term, text]) => (
          <div key={term} className="grid grid-cols-[3.5rem_1fr] gap-x-3">
            <dt className="text-ink-soft">{term}</dt>
            <dd>
              <Lettered text={text} />
            </dd>
          </div>
        ))}
      </dl>
    </article>
  )
}
