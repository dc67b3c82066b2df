'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { DataTable } from '@/app/_components/ui/data-table'
import { Mark } from '@/app/_components/ui/mark'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import type { Carry } from '@/lib/carry/carry'
import { isTooFarAhead } from '@/lib/carry/repeat'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { coverWords } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { OutSheet, piecesOut } from '../../_components/out-sheet'
import { PlannedSheet } from '../../_components/planned-sheet'
import type { Page } from './carry-page-view'
import { PlansSheet } from './plans-sheet'

type CarryListsProps = { reader: Reader; now: Date; open: Page<Carry>; ended: Page<Carry> }

/** What is out, what is planned, and the last ones that ended. */
export function CarryLists({ reader, now, open: initialOpen, ended: initialEnded }: CarryListsProps) {
  const { data: open = initialOpen } = useSiteQuery<Page<Carry>>({
    site: reader.site,
    area: 'carries',
    key: ['open'],
    path: '/carries?state=open&sort=planned&limit=50',
    initial: initialOpen,
  })
  const { data: ended = initialEnded } = useSiteQuery<Page<Carry>>({
    site: reader.site,
    area: 'carries',
    key: ['ended'],
    path: '/carries?state=ended&sort=-planned&limit=10',
    initial: initialEnded,
  })
  const out = piecesOut(open.items)
  const planned = open.items.filter(
    (carry) =>
      carry.state === 'planned' &&
      !isTooFarAhead(
        { ...carry, plannedAt: new Date(carry.plannedAt), isRepeated: carry.repeat !== null },
        now,
      ),
  )
  return (
    <>
      {out.length > 0 ? <OutSheet title="Out now" pieces={out} reader={reader} now={now} /> : null}
      {planned.map((carry) => (
        <PlannedSheet key={carry.id} carry={carry} reader={reader} now={now} />
      ))}
      <PlansSheet reader={reader} now={now} />
      {ended.items.length > 0 ? (
        <Sheet
          id="ended"
          title="Lately"
          action={
            <TextLink href={`/sites/${reader.site}/carry/how-good`}>How good the verdicts were</TextLink>
          }
        >
          <DataTable
            caption="Carries that ended lately"
            rows={ended.items}
            rowKey={(carry) => carry.id}
            columns={[
              {
                id: 'pieces',
                header: 'Pieces',
                phone: 'title',
                cell: (carry) => (
                  <TextLink href={`/sites/${reader.site}/carry/${carry.id}`}>
                    {carry.pieces.map((piece) => piece.number).join(', ') || 'whatever was taken'}
                  </TextLink>
                ),
              },
              { id: 'to', header: 'To', phone: 'line', cell: (carry) => carry.toRoom.name },
              {
                id: 'when',
                header: 'When',
                phone: 'line',
                cell: (carry) => formatMoment(carry.startedAt ?? carry.plannedAt, reader.timeZone, now),
              },
              { id: 'how', header: 'Cover', phone: 'line', cell: (carry) => coverWords[carry.cover] },
              {
                id: 'end',
                header: 'How it ended',
                phone: 'line',
                cell: (carry) => (
                  <span className="inline-flex items-baseline gap-2">
                    {carry.againstAdvice ? <Mark kind="leave" className="translate-y-[3px]" /> : null}
                    {endWords(carry)}
                  </span>
                ),
              },
            ]}
          />
        </Sheet>
      ) : null}
    </>
  )
}

function endWords(carry: Carry): string {
  if (carry.state === 'called-off' || carry.startedAt === null || carry.endedAt === null) return 'called off'
  const minutes = (new Date(carry.endedAt).getTime() - new Date(carry.startedAt).getTime()) / 60_000
  return `back after ${formatDuration(minutes)}${carry.againstAdvice ? ', against the advice' : ''}`
}
