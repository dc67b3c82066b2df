'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { Rule } from '@/lib/notices/notice'
import { ruleNames } from '@/lib/notices/rule-names'

type View = { siteName: string; rule: Rule | null; isOff: boolean }

export function UnsubscribeView({ token, initial }: { token: string; initial: View }) {
  const [view, setView] = useState(initial)
  const press = useAction<Record<string, never>, View>({
    run: () => apiFetch(`/unsubscribe/${encodeURIComponent(token)}`, { method: 'POST' }),
    onDone: setView,
    errors: 'inline',
  })
  const what = view.rule === null ? 'any notice' : `“${ruleNames[view.rule]}”`
  return (
    <>
      <PageSentence above={view.siteName}>
        {view.isOff ? `No mail comes to you about ${what}.` : `No more mails about ${what}?`}
      </PageSentence>
      <Sheet>
        <div className="flex flex-col items-start gap-4">
          <p className="max-w-words">
            Notices still stand on their page, and other ways of hearing of them stay as they are. Under
            Notices it can be switched on again.
          </p>
          {view.isOff ? null : (
            <Button
              variant="filled"
              pending={press.pending}
              onClick={() => {
                press.act({})
              }}
            >
              No more of these
            </Button>
          )}
          {press.error ? (
            <p role="alert" className="text-warn">
              {press.problem?.detail ?? 'No answer came. Nothing was changed; press again.'}
            </p>
          ) : null}
        </div>
      </Sheet>
    </>
  )
}
