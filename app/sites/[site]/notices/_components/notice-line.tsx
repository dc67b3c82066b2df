'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { classNames } from '@/app/_components/ui/class-names'
import { Mark } from '@/app/_components/ui/mark'
import { RichText } from '@/app/_components/ui/rich-text'
import { useAction } from '@/app/_components/use-action'
import { AnswerButtons } from '@/app/sites/[site]/_components/answer-buttons'
import { formatFullMoment, formatMoment } from '@/lib/format/times'
import type { Notice, Rule } from '@/lib/notices/notice'
import { answeredWords } from '@/lib/notices/answers'
import { isFresh } from '@/lib/notices/rule-sentences'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { DeliveryFold } from './delivery-fold'

/** After so long nobody can take in hand any more what it was about. */
const inHandWithinMs = 48 * 3_600_000

/** Where a notice leads, in words. */
const linkWords: Readonly<Record<Rule, string>> = {
  'planned-carry': 'Open the carry',
  'verdict-worse': 'Open the carry',
  'time-nearly-out': 'Open the carry',
  'time-out': 'Open the carry',
  'lock-up': 'What is out',
  'last-call': 'What is out',
  'tub-out': 'What is out',
  'losing-fit': 'Open the piece',
  'shop-unfit': 'Open the room',
  'good-hours': 'Plan a carry',
  'keep-room-band': 'Open the room',
  'damper-than-normal': 'Open the room',
  'mould-risk': 'Open the room',
  'too-dry': 'Open the room',
  'cold-iron': 'Open the room',
  'blank-ready': 'Open the piece',
  'weighing-due': 'What is due',
  'sensor-silent': 'Open the sensor',
  'battery-low': 'Open the sensor',
  'refused-messages': 'Look at them',
  test: 'Notices',
}

export function NoticeLine({ reader, notice }: { reader: Reader; notice: Notice }) {
  const path = `/sites/${reader.site}/notices/${notice.id}`
  const invalidates = [
    siteKey(reader.site, 'notices'),
    siteKey(reader.site, 'frame'),
    siteKey(reader.site, 'now'),
  ]
  const change = useAction<{ isSeen?: true; isAcknowledged?: true }, unknown>({
    run: (body) => apiFetch(path, { method: 'PATCH', body }),
    invalidates,
  })
  const moment = (at: string) => formatMoment(at, reader.timeZone, new Date(reader.at))
  const isRecent = new Date(reader.at).getTime() - new Date(notice.at).getTime() < inHandWithinMs
  const mayAcknowledge = may(reader.role, 'notices:acknowledge')
  // What was seen and asks nothing any more is one line in the list; the rest of it is a press away.
  const isPast = !isFresh(notice) && notice.asks.length === 0

  return (
    <li className="grid grid-cols-[1.75rem_minmax(0,1fr)] gap-x-2 py-4 sm:grid-cols-[2rem_7.5rem_minmax(0,1fr)_auto]">
      <Mark kind={notice.mark} size={20} className="mt-0.5" />
      <time
        dateTime={notice.at}
        title={formatFullMoment(notice.at, reader.timeZone)}
        className="text-label leading-6 text-ink-soft"
      >
        {moment(notice.at)}
      </time>
      <div className="max-sm:col-start-2">
        <p className={classNames('max-w-words', isFresh(notice) && 'font-semibold')}>
          <RichText parts={notice.title} />
        </p>
        {notice.body && !isPast ? (
          <p className="max-w-words whitespace-pre-line">
            <RichText parts={notice.body} />
          </p>
        ) : null}
        {notice.answered.map(({ by, answer, at, until }) => (
          <p key={by} className="text-label">
            {by} {answeredWords[answer]}
            {until === null ? '' : ` ${moment(until)}`}, {moment(at)}.
          </p>
        ))}
        {mayAcknowledge && notice.asks.length > 0 ? (
          <div className="my-2">
            <AnswerButtons site={reader.site} notice={notice} />
          </div>
        ) : null}
        <p className={classNames('text-label', notice.isLost ? 'text-warn' : 'text-ink-soft')}>
          {notice.delivery}.{' '}
          {notice.acknowledgedAt
            ? `Acknowledged${notice.acknowledgedBy ? ` by ${notice.acknowledgedBy}` : ''}, ${moment(notice.acknowledgedAt)}.`
            : notice.isSeen
              ? 'Seen.'
              : 'Not seen yet.'}
        </p>
        <DeliveryFold reader={reader} notice={notice}>
          {notice.body && isPast ? (
            <p className="mb-2 max-w-words text-base whitespace-pre-line">
              <RichText parts={notice.body} />
            </p>
          ) : null}
        </DeliveryFold>
      </div>
      <div className="flex flex-wrap items-start gap-2 max-sm:col-start-2 max-sm:mt-2 sm:flex-col sm:items-end">
        {notice.link ? (
          <ButtonLink href={`/sites/${reader.site}${notice.link}`}>{linkWords[notice.rule]}</ButtonLink>
        ) : null}
        {mayAcknowledge &&
        notice.acknowledgedAt === null &&
        notice.asks.length === 0 &&
        notice.urgency !== 'whenever' &&
        isRecent ? (
          <Button
            pending={change.pending}
            onClick={() => {
              change.act({ isSeen: true, isAcknowledged: true })
            }}
          >
            I have it in hand
          </Button>
        ) : null}
        {isFresh(notice) ? (
          <Button
            variant="link"
            pending={change.pending}
            onClick={() => {
              change.act({ isSeen: true })
            }}
          >
            Seen
          </Button>
        ) : null}
      </div>
    </li>
  )
}
