'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import { trackHeadline, type TrackRecord, type TurnedCounts } from '@/lib/carry/track-record'
import { formatCount } from '@/lib/format/figures'
import type { Reader } from '@/lib/sites/reader'
import { TrackFigure } from './track-figure'
import { TrackTable } from './track-table'

/** How good the verdicts were: what was told beside how each lid turned. */
export function HowGoodView({ reader, initial }: { reader: Reader; initial: TrackRecord }) {
  const { data: record = initial } = useSiteQuery<TrackRecord>({
    site: reader.site,
    area: 'pieces',
    key: ['how-good'],
    path: '/carries/how-good',
    initial,
  })
  const base = `/sites/${reader.site}`
  if (record.points.length === 0)
    return (
      <>
        <PageSentence parts={trackHeadline(record)} />
        <Sheet>
          <EmptyState
            title="No lid was tried after a carry yet"
            actions={<ButtonLink href={`${base}/carry`}>To the carries</ButtonLink>}
          >
            When a box is back you are asked how its lid turned: one press. From about ten answers on, the
            times told are this place’s own.
            {untestedWords(record)}
          </EmptyState>
        </Sheet>
      </>
    )
  return (
    <>
      <PageSentence parts={trackHeadline(record)} />
      <Sheet id="promises" title="What was told, and how the lid turned">
        <dl className="divide-y divide-line">
          <Told title="In by the time told" counts={record.kept}>
            The promise: even quick wood would have had some of its allowance left.
          </Told>
          <Told title="In later than that" counts={record.late}>
            Nothing was promised for these any more.
          </Told>
          <Told title="Told to leave it, and it went" counts={record.against}>
            Where these held, the advice was more careful than it had to be; it means to be.
          </Told>
        </dl>
      </Sheet>
      <Sheet
        id="figure"
        title="Allowance used, against what was felt"
        aside="each lid one mark, the line from slow to quick wood"
        ticks
      >
        <TrackFigure points={record.points} />
        <p className="mt-4 max-w-words text-label text-ink-soft">
          {agreementWords(record)} {untestedWords(record)}
        </p>
      </Sheet>
      {record.paces.length > 0 ? (
        <Sheet id="learned" title="What has been learned">
          <ul className="flex flex-col gap-3">
            {record.paces.map(({ movementClass, words }) => (
              <li key={movementClass} className="max-w-words">
                {words}
              </li>
            ))}
          </ul>
        </Sheet>
      ) : null}
      <Sheet id="lids" title="Each lid that was tried">
        <TrackTable points={record.points} reader={reader} />
      </Sheet>
      <div className="px-4 sm:px-0">
        <ButtonLink href={`${base}/carry`}>All carries</ButtonLink>
      </div>
    </>
  )
}

function Told({ title, counts, children }: { title: string; counts: TurnedCounts; children: string }) {
  return (
    <div className="py-4 first:pt-0 last:pb-0">
      <dt className="font-semibold">
        {title}
        {counts.all > 0 ? `: ${formatCount(counts.all, 'lid')}` : ''}
      </dt>
      <dd>
        {counts.all === 0 ? <p>None so far.</p> : <p>{countWords(counts)}</p>}
        <p className="text-label text-ink-soft">{children}</p>
      </dd>
    </div>
  )
}

function countWords(counts: TurnedCounts): string {
  const parts = [
    [counts['as-before'], 'turned as before'],
    [counts.looser, 'looser'],
    [counts.tighter, 'tighter a quarter turn on'],
    [counts.binds, 'bound'],
  ] as const
  const words = parts.filter(([count]) => count > 0).map(([count, what]) => `${String(count)} ${what}`)
  return `${words.join(', ')}.`
}

function agreementWords({ agreement, points }: TrackRecord): string {
  const { same, oneOff, further } = agreement
  const off = [
    ...(oneOff > 0 ? [`${String(oneOff)} ${oneOff === 1 ? 'was' : 'were'} one step off`] : []),
    ...(further > 0 ? [`${String(further)} further`] : []),
  ].join(' and ')
  return `${String(same)} of ${formatCount(points.length, 'lid')} turned as the reckoning had it${off === '' ? '' : `; ${off}`}.`
}

const untestedWords = ({ untested }: TrackRecord): string =>
  untested === 0
    ? ''
    : ` ${formatCount(untested, 'other answer was', 'other answers were')} told at rest, or of a piece that can’t be worked out, and test no verdict.`
