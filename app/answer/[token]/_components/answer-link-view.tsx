'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { Answer } from '@/lib/notices/answer'
import { answerMeans, answerWords, type Later, laterMeans, laterWords } from '@/lib/notices/answers'

type LinkView = {
  state: 'open' | 'done' | 'expired'
  siteName: string
  title: string
  body: string
  answer: Answer
  later?: Later | undefined
  answered: string[]
}

/** One question, one button. */
export function AnswerLinkView({ token, initial }: { token: string; initial: LinkView }) {
  const [view, setView] = useState(initial)
  const press = useAction<Record<string, never>, LinkView>({
    run: () => apiFetch(`/answers/${encodeURIComponent(token)}`, { method: 'POST' }),
    onDone: setView,
    errors: 'inline',
  })
  const words = view.answer === 'later' ? laterWords[view.later ?? 'hour'] : answerWords[view.answer]
  const means = view.answer === 'later' ? laterMeans[view.later ?? 'hour'] : answerMeans[view.answer]
  return (
    <>
      <PageSentence above={view.siteName}>{view.title}</PageSentence>
      <Sheet>
        <div className="flex flex-col items-start gap-4">
          {view.body ? <p className="max-w-words whitespace-pre-line">{view.body}</p> : null}
          {view.state === 'open' ? (
            <>
              <Button
                variant="filled"
                pending={press.pending}
                onClick={() => {
                  press.act({})
                }}
              >
                {view.answer === 'later' ? `Ask me again: ${words.toLowerCase()}` : words}
              </Button>
              <p className="max-w-words text-ink-soft">{means}</p>
            </>
          ) : (
            <p role="status" className="font-semibold">
              {view.state === 'expired'
                ? 'This link has run out. Sign in and answer on the page Notices.'
                : press.done
                  ? 'It is set down. Thank you.'
                  : 'It was answered already. Nothing more needs to be done.'}
            </p>
          )}
          {press.error ? (
            <p role="alert" className="text-warn">
              {press.problem?.detail ?? 'No answer came. Nothing was changed; press again.'}
            </p>
          ) : null}
          {view.answered.length > 0 ? (
            <ul className="text-label text-ink-soft">
              {view.answered.map((line) => (
                <li key={line}>{line}.</li>
              ))}
            </ul>
          ) : null}
        </div>
      </Sheet>
    </>
  )
}
