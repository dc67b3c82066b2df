import type { WorkedExample } from '@/lib/method/examples'

type WorkedProps = {
  example: WorkedExample
  /** What it is an example of. */
  of: string
}

/** A sum that the program has just done. */
export function Worked({ example, of }: WorkedProps) {
  const titleId = `example-${example.id}`
  return (
    <section aria-labelledby={titleId} className="flex flex-col gap-2 break-inside-avoid bg-wash px-4 py-4">
      <h3 id={titleId} className="font-semibold">
        Worked example<span className="sr-only">: {of}</span>
      </h3>
      <p className="max-w-words">{example.given}</p>
      <dl className="grid max-w-[46rem] gap-x-6 gap-y-1 sm:grid-cols-[minmax(0,2fr)_minmax(0,3fr)]">
        {example.lines.map(({ what, value }) => (
          <div key={what} className="contents">
            <dt className="text-ink-soft max-sm:mt-2">{what}</dt>
            <dd className="font-semibold">{value}</dd>
          </div>
        ))}
      </dl>
      <p className="max-w-words">{example.so}</p>
    </section>
  )
}
