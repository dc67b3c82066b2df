'use client'

import { ChevronDown } from 'lucide-react'
import type { ReactNode } from 'react'
import { UsedChart } from '@/app/_components/charts/used-chart'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer } from '@/lib/carry/carry-check'
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
                </div>
              </div>
              {item.check.kind === 'verdict' ? (
                <Graph number={item.number}>
                  <UsedChart
                    number={item.number}
                    check={item.check}
                    startsAt={answer.startsAt}
                    stayMinutes={answer.stayMinutes}
                    timeZone={reader.timeZone}
                    now={now}
                  />
                </Graph>
              ) : null}
            </li>
          )
        })}
      </ul>
    </Sheet>
  )
}

/** In sight on a desk, folded on a phone, where the verdicts come first. */
function Graph({ number, children }: { number: string; children: ReactNode }) {
  return (
    <>
      <div className="min-w-0 max-sm:hidden">{children}</div>
      <details className="group sm:hidden">
        <summary className="flex min-h-11 items-center justify-between font-semibold text-heart">
          Graph of {number}
          <ChevronDown aria-hidden="true" size={20} strokeWidth={1.5} className="group-open:rotate-180" />
        </summary>
        {children}
      </details>
    </>
  )
}
