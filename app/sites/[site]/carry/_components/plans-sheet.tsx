'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import type { Repeat } from '@/lib/carry/repeat'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { PlanForm } from './plan-form'
import { RepeatLine } from './repeat-line'

/** Plans that come again each week, and the way to make one, or one for whatever is taken. */
export function PlansSheet({ reader, now }: { reader: Reader; now: Date }) {
  const [isPlanning, setIsPlanning] = useState(false)
  const { data } = useSiteQuery<{ items: Repeat[] }>({
    site: reader.site,
    area: 'carries',
    key: ['repeats'],
    path: '/repeats',
  })
  const repeats = data?.items ?? []
  const mayDo = may(reader.role, 'carries:do')
  if (repeats.length === 0 && !mayDo) return null
  return (
    <Sheet
      id="plans"
      title="Plans that come again"
      action={
        mayDo && !isPlanning ? (
          <Button
            onClick={() => {
              setIsPlanning(true)
            }}
          >
            Plan again and again
          </Button>
        ) : undefined
      }
    >
      {isPlanning ? (
        <div className="mb-5 border-b border-line pb-5">
          <PlanForm
            reader={reader}
            now={now}
            onDone={() => {
              setIsPlanning(false)
            }}
          />
        </div>
      ) : null}
      {repeats.length === 0 ? (
        <p className="max-w-words text-ink-soft">
          None so far. If you go to the shop on the same days, with the same pieces or with whatever is on the
          bench, plan it once: each time is judged two days ahead, and you are told if it had better not be.
        </p>
      ) : (
        <ul>
          {repeats.map((repeat) => (
            <RepeatLine key={repeat.id} repeat={repeat} reader={reader} now={now} />
          ))}
        </ul>
      )}
    </Sheet>
  )
}
