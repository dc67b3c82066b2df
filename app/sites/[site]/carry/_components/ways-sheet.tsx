'use client'

import { Mark, markWords } from '@/app/_components/ui/mark'
import { Sheet } from '@/app/_components/ui/sheet'
import type { CarryCheckAnswer } from '@/lib/carry/carry-answer'
import type { WayPiece } from '@/lib/carry/ways'
import { formatMoment } from '@/lib/format/times'
import type { Reader } from '@/lib/sites/reader'
import { stayAside, type Way } from './carry-ways'

type WaysSheetProps = {
  answer: CarryCheckAnswer
  ways: readonly Way[]
  best: Way | undefined
  reader: Reader
  now: Date
}

const COUNT = ['', 'One way', 'Two ways', 'Three ways'] as const
/** More columns than these would not stand side by side. */
const COLUMNS_MAX = 5

/** As asked, in the best cover and at the better hour, side by side. */
export function WaysSheet(props: WaysSheetProps) {
  const { answer, ways } = props
  const isWide = answer.pieces.filter(({ check }) => check.kind === 'verdict').length <= COLUMNS_MAX
  return (
    <Sheet id="ways" title={`${COUNT[ways.length] ?? 'Ways'} to do it`} aside={stayAside(answer)}>
      {isWide ? <WaysTable {...props} /> : null}
      <WaysList {...props} className={isWide ? 'sm:hidden' : undefined} />
    </Sheet>
  )
}

function WaysTable({ answer, ways, best, reader, now }: WaysSheetProps) {
  const judged = answer.pieces.filter(({ check }) => check.kind === 'verdict')
  return (
    <table className="w-full max-sm:hidden">
      <thead>
        <tr className="border-b border-edge text-left text-label text-ink-soft">
          <th scope="col" className="py-2 pr-4 font-semibold">
            Way
          </th>
          {judged.map((piece) => (
            <th key={piece.id} scope="col" className="px-3 py-2 font-semibold">
              {piece.number}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {ways.map((way) => (
          <tr
            key={way.key}
            className={`border-b border-line align-top last:border-b-0 ${way === best && ways.length > 1 ? 'bg-wash [--figure-ground:var(--wash)]' : ''}`}
          >
            <th scope="row" className="px-3 py-3 text-left font-normal">
              <span className="block font-semibold">{way.title}</span>
              <span className="block text-label text-ink-soft">{way.words}</span>
            </th>
            {judged.map(({ id }) => {
              const piece = way.pieces.find((one) => one.id === id)
              return (
                <td key={id} className="px-3 py-3">
                  {piece ? <WayVerdict piece={piece} reader={reader} now={now} /> : null}
                </td>
              )
            })}
          </tr>
        ))}
      </tbody>
    </table>
  )
}

function WaysList({
  answer,
  ways,
  best,
  reader,
  now,
  className,
}: WaysSheetProps & { className?: string | undefined }) {
  return (
    <ul className={className}>
      {ways.map((way) => (
        <li
          key={way.key}
          className={`-mx-4 border-b border-line px-4 py-3 last:border-b-0 ${way === best && ways.length > 1 ? 'bg-wash [--figure-ground:var(--wash)]' : ''}`}
        >
          <p className="font-semibold">{way.title}</p>
          <p className="text-label text-ink-soft">{way.words}</p>
          <p className="mt-1 flex flex-wrap gap-x-6 gap-y-1">
            {way.pieces.map((piece) => (
              <WayVerdict
                key={piece.id}
                piece={piece}
                number={answer.pieces.find(({ id }) => id === piece.id)?.number}
                reader={reader}
                now={now}
              />
            ))}
          </p>
        </li>
      ))}
    </ul>
  )
}

type WayVerdictProps = { piece: WayPiece; number?: string | undefined; reader: Reader; now: Date }

function WayVerdict({ piece, number, reader, now }: WayVerdictProps) {
  const { verdict, earlyAt } = piece
  const words =
    verdict === 'keep-short' && earlyAt !== null
      ? `by ${formatMoment(earlyAt, reader.timeZone, now)}`
      : markWords[verdict].toLowerCase()
  return (
    <span className="inline-flex items-baseline gap-2">
      <Mark kind={verdict} className="translate-y-[3px]" />
      <span>
        {number ? <strong>{number} </strong> : null}
        {words}
      </span>
    </span>
  )
}
