'use client'

import { Button } from '@/app/_components/ui/button'
import { Mark, markWords } from '@/app/_components/ui/mark'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer } from '@/lib/carry/carry-check'
import { formatMoment } from '@/lib/format/times'
import { coverWords } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { CheckLine } from '../../_components/piece-verdict'

type WaysSheetProps = {
  answer: CarryCheckAnswer
  reader: Reader
  now: Date
  isBaggedBetter: boolean
  onBagged: () => void
}

/** As planned, and in the better cover, side by side. */
export function WaysSheet({ answer, reader, now, isBaggedBetter, onBagged }: WaysSheetProps) {
  const clock = { timeZone: reader.timeZone, now }
  return (
    <Sheet id="ways" title="Two ways to do it">
      <ul>
        <li className="border-b border-line py-3 first:pt-0">
          <p className="font-semibold">{sentenceCase(coverWords[answer.cover])}</p>
          <p className="text-label text-ink-soft">as asked</p>
          <p className="mt-1 flex flex-wrap gap-x-6 gap-y-1">
            {answer.pieces.map((piece) => (
              <CheckLine key={piece.id} number={piece.number} check={piece.check} {...clock} />
            ))}
          </p>
        </li>
        <li
          className={`-mx-4 flex flex-wrap items-center justify-between gap-4 px-4 py-3 sm:-mx-6 sm:px-6 ${isBaggedBetter ? 'bg-wash [--figure-ground:var(--wash)]' : ''}`}
        >
          <div>
            <p className="font-semibold">Bagged, or in the shut tub</p>
            <p className="text-label text-ink-soft">
              shut tight, with a little house-dry air; open only while you work it
            </p>
            <p className="mt-1 flex flex-wrap gap-x-6 gap-y-1">
              {answer.pieces.map((piece) => {
                if (piece.bagged === null)
                  return <CheckLine key={piece.id} number={piece.number} check={piece.check} {...clock} />
                const { verdict, earlyAt } = piece.bagged
                const words =
                  verdict === 'keep-short' && earlyAt !== null
                    ? `by ${formatMoment(earlyAt, reader.timeZone, now)}`
                    : markWords[verdict].toLowerCase()
                return (
                  <span key={piece.id} className="inline-flex items-baseline gap-2">
                    <Mark kind={verdict} className="translate-y-[3px]" />
                    <span>
                      <strong>{piece.number}</strong> {words}
                    </span>
                  </span>
                )
              })}
            </p>
          </div>
          <Button onClick={onBagged}>Ask about it bagged</Button>
        </li>
      </ul>
    </Sheet>
  )
}

const sentenceCase = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}`
