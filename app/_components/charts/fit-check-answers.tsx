import { classNames } from '@/app/_components/ui/class-names'
import { Mark } from '@/app/_components/ui/mark'
import type { FitAnswer } from '@/lib/fit/fit-answers'
import { verdictWords } from '@/lib/fit/fit-check-words'

const marks = { cut: 'fine', 'cut-easy': 'keep-short', rest: 'leave' } as const
const colours = { cut: 'text-good', 'cut-easy': 'text-ink', rest: 'text-warn' } as const

/** The three answers in words; the one that holds lies on wash under a heart edge. */
export function FitCheckAnswers({ answers }: { answers: readonly FitAnswer[] }) {
  return (
    <ul className="grid gap-x-2 gap-y-4 sm:grid-cols-3">
      {answers.map(({ verdict, words, holds }) => (
        <li
          key={verdict}
          aria-current={holds ? 'true' : undefined}
          className={classNames(
            'border-t-3 px-4 py-3',
            holds ? 'border-heart bg-wash' : 'border-transparent text-ink-soft',
          )}
        >
          <p
            className={classNames('mb-1 flex items-center gap-2 text-title font-semibold', colours[verdict])}
          >
            <Mark kind={marks[verdict]} size={20} />
            {verdictWords[verdict]}
            {holds ? <span className="sr-only">, now</span> : null}
          </p>
          <p>{words}</p>
        </li>
      ))}
    </ul>
  )
}
