'use client'

import { ChevronDown } from 'lucide-react'
import type { ReactNode } from 'react'
import { UsedChart } from '@/app/_components/charts/used-chart'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer, CheckedPiece } from '@/lib/carry/carry-answer'
import type { Piece } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { PieceVerdict } from '../../_components/piece-verdict'
import { listedOutline } from './listed-outline'

type CheckPiecesProps = {
  answer: CarryCheckAnswer
  pieces: readonly Piece[]
  reader: Reader
  now: Date
  isOld: boolean
}

/** One row for each piece: its verdict and why, and how much of what its lid may lose is used. */
export function CheckPieces({ answer, pieces, reader, now, isOld }: CheckPiecesProps) {
  const graphs = answer.pieces.flatMap((item) => {
    const graph = <UsedGraph key={item.id} item={item} answer={answer} reader={reader} now={now} />
    return item.check.kind === 'verdict' && item.check.curve !== null ? [graph] : []
  })
  return (
    <Sheet
      id="piece-by-piece"
      title="Piece by piece"
      aside={`How much of what the lid may lose is used in ${answer.room.name}`}
    >
      <ul aria-busy={isOld} className={isOld ? 'opacity-60' : undefined}>
        {answer.pieces.map((item) => {
          const piece = pieces.find((candidate) => candidate.id === item.id)
          return (
            <li
              key={item.id}
              className="grid gap-x-6 gap-y-4 border-b border-line py-5 first:pt-0 last:border-b-0 last:pb-0 md:grid-cols-[minmax(0,1fr)_minmax(0,22rem)]"
            >
              <div className="flex gap-4">
                <PieceOutline outline={piece ? listedOutline(piece) : 'low'} size={52} />
                <div className="min-w-0">
                  <p className="text-label text-ink-soft">
                    <strong className="text-ink">{item.number}</strong> {item.title}
                  </p>
                  <PieceVerdict check={item.check} timeZone={reader.timeZone} now={now} />
                  <ThereAndBack item={item} />
                </div>
              </div>
              <div className="min-w-0 max-sm:hidden">
                <UsedGraph item={item} answer={answer} reader={reader} now={now} />
              </div>
            </li>
          )
        })}
      </ul>
      {graphs.length > 0 ? <FoldedGraphs count={graphs.length}>{graphs}</FoldedGraphs> : null}
    </Sheet>
  )
}

/** How long to wait at home, and what to tell us so that the time is better known. */
function ThereAndBack({ item: { backHome, hangsOn } }: { item: CheckedPiece }) {
  if (backHome === null && hangsOn === null) return null
  return (
    <dl className="mt-3 flex flex-col gap-2 border-l-2 border-line pl-3 text-label">
      {backHome ? (
        <div>
          <dt className="font-semibold">At home again</dt>
          <dd className="text-ink-soft">{backHome.words}</dd>
        </div>
      ) : null}
      {hangsOn ? (
        <div>
          <dt className="font-semibold">What this hangs on</dt>
          <dd className="text-ink-soft">{hangsOn.ask}</dd>
        </div>
      ) : null}
    </dl>
  )
}

type UsedGraphProps = { item: CheckedPiece; answer: CarryCheckAnswer; reader: Reader; now: Date }

function UsedGraph({ item, answer, reader, now }: UsedGraphProps) {
  const { check } = item
  if (check.kind !== 'verdict' || check.curve === null) return null
  return (
    <UsedChart
      number={item.number}
      check={{ ...check, curve: check.curve }}
      startsAt={answer.startsAt}
      stayMinutes={answer.stayMinutes}
      timeZone={reader.timeZone}
      now={now}
    />
  )
}

const GRAPHS = ['', 'Graph', 'Graphs of both', 'Graphs of the three', 'Graphs of the four'] as const

/** Folded on a phone, where the verdicts come first. */
function FoldedGraphs({ count, children }: { count: number; children: ReactNode }) {
  return (
    <details className="group mt-4 border-t border-line sm:hidden">
      <summary className="flex min-h-11 items-center justify-between font-semibold text-heart">
        {GRAPHS[count] ?? 'Graphs of them all'}
        <ChevronDown aria-hidden="true" size={20} strokeWidth={1.5} className="group-open:rotate-180" />
      </summary>
      <div className="flex flex-col gap-6">{children}</div>
    </details>
  )
}
