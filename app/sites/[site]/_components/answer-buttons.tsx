'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { useAction } from '@/app/_components/use-action'
import { answerWords, laterSchema, laterWords, type NewAnswer } from '@/lib/notices/answers'
import type { Notice } from '@/lib/notices/notice'

type AnswerButtonsProps = {
  site: string
  notice: Pick<Notice, 'id' | 'asks' | 'title'>
  /** The one filled button of its question. */
  isFirst?: boolean
}

/** What can be answered to a notice, one press each; "later" opens its three hours in place. */
export function AnswerButtons({ site, notice, isFirst = false }: AnswerButtonsProps) {
  const [isLater, setIsLater] = useState(false)
  const give = useAction<NewAnswer, Notice>({
    run: (body) => apiFetch(`/sites/${site}/notices/${notice.id}/answers`, { method: 'POST', body }),
    invalidates: (['notices', 'now', 'carries', 'frame'] as const).map((area) => siteKey(site, area)),
    done: 'Set down',
  })
  if (notice.asks.length === 0) return null
  return (
    <div role="group" aria-label={`Answer: ${notice.title}`} className="flex flex-wrap gap-2">
      {notice.asks.map((answer, index) =>
        answer === 'later' ? (
          <Button
            key={answer}
            variant="link"
            aria-expanded={isLater}
            onClick={() => {
              setIsLater(!isLater)
            }}
          >
            Later
          </Button>
        ) : (
          <Button
            key={answer}
            variant={isFirst && index === 0 ? 'filled' : 'second'}
            pending={give.pending}
            onClick={() => {
              give.act({ answer })
            }}
          >
            {answerWords[answer]}
          </Button>
        ),
      )}
      {isLater
        ? laterSchema.options.map((later) => (
            <Button
              key={later}
              pending={give.pending}
              onClick={() => {
                give.act({ answer: 'later', later })
              }}
            >
              {laterWords[later]}
            </Button>
          ))
        : null}
    </div>
  )
}
