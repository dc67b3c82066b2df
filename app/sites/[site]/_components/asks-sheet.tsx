'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Mark } from '@/app/_components/ui/mark'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { formatMoment } from '@/lib/format/times'
import { answeredWords } from '@/lib/notices/answers'
import type { AsksView } from '@/lib/notices/delivery'
import type { Reader } from '@/lib/sites/reader'
import { AnswerButtons } from './answer-buttons'
import { SessionLine, SessionOffer } from './session-line'

function useAsks(reader: Reader, initial: AsksView): AsksView {
  const { site } = reader
  const query = useSiteQuery({ site, area: 'notices', key: ['asks'], path: '/notices/asks', initial })
  return query.data ?? initial
}

/** While at work: the slim line that says so, above everything. */
export function AtWorkNow({ reader, initial }: { reader: Reader; initial: AsksView }) {
  const { sessionUntil, settingsVersion } = useAsks(reader, initial)
  return <SessionLine reader={reader} until={sessionUntil} version={settingsVersion} />
}

/** Stands at the end of the page: being silent is no question of the moment. */
export function AtWork({ reader, initial }: { reader: Reader; initial: AsksView }) {
  const { sessionUntil, settingsVersion } = useAsks(reader, initial)
  return <SessionOffer reader={reader} until={sessionUntil} version={settingsVersion} />
}

type AsksSheetProps = {
  reader: Reader
  initial: AsksView
  /** Nothing above it asks more pressingly, so its first answer is the filled button. */
  isFirst: boolean
}

/** What is asked now, to be answered with one press. */
export function AsksSheet({ reader, initial, isFirst }: AsksSheetProps) {
  const view = useAsks(reader, initial)
  const now = new Date(reader.at)
  return (
    <>
      {view.lost > 0 ? (
        <p className="text-label text-warn max-sm:px-4">
          {view.lost === 1 ? 'A notice' : `${String(view.lost)} notices`} of the last week could not be sent
          to somebody. <TextLink href={`/sites/${reader.site}/notices`}>Look at what was told</TextLink>
        </p>
      ) : null}
      {view.items.length > 0 ? (
        <Sheet id="asks" title="Asks you" edge="ink">
          <ul className="divide-y divide-line">
            {view.items.map((notice, index) => (
              <li key={notice.id} className="flex flex-col gap-3 py-4 first:pt-0 last:pb-0">
                <div className="flex gap-4">
                  <Mark kind={notice.mark} size={20} className="mt-0.5" />
                  <div>
                    <p className="max-w-words font-semibold">{notice.title}</p>
                    {notice.answered.map(({ by, answer, at }) => (
                      <p key={by} className="text-label text-ink-soft">
                        {by} {answeredWords[answer]}, {formatMoment(at, reader.timeZone, now)}.
                      </p>
                    ))}
                  </div>
                </div>
                <AnswerButtons site={reader.site} notice={notice} isFirst={isFirst && index === 0} />
              </li>
            ))}
          </ul>
        </Sheet>
      ) : null}
    </>
  )
}
