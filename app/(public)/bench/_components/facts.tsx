import type { ReactNode } from 'react'

export type Fact = { name: string; figure: ReactNode; words?: ReactNode }

/** Figures with their doubt, one to a line: what it is, how much, what that means. */
export function Facts({ facts }: { facts: readonly Fact[] }) {
  return (
    <dl>
      {facts.map(({ name, figure, words }) => (
        <div
          key={name}
          className="grid gap-x-6 border-b border-line py-2.5 first:pt-0 last:border-b-0 last:pb-0 sm:grid-cols-[minmax(0,14rem)_minmax(0,1fr)]"
        >
          <dt className="text-ink-soft">{name}</dt>
          <dd>
            <strong>{figure}</strong>
            {words === undefined ? null : <span className="text-ink-soft"> {words}</span>}
          </dd>
        </div>
      ))}
    </dl>
  )
}
