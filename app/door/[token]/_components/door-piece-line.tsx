import { classNames } from '@/app/_components/ui/class-names'
import { Mark } from '@/app/_components/ui/mark'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import type { DoorPiece } from '@/lib/door/door'

/** One piece that is out: what to do and by when, with the minutes left at the right where they press. */
export function DoorPieceLine({ piece, isFirst = false }: { piece: DoorPiece; isFirst?: boolean }) {
  const { number, words, clock, since, minutesLeft, state } = piece
  const presses = state === 'overdue' || state === 'soon' || state === 'unknown'
  return (
    <li
      className={classNames(
        'grid grid-cols-[auto_minmax(0,1fr)_auto] items-center gap-x-8 border-b-2 border-edge py-2',
        presses && '-mx-6 border-l-[16px] border-l-warn pr-6 pl-2 sm:-mx-10 sm:pr-10 sm:pl-6',
      )}
    >
      <PieceOutline outline={piece.outline} isOut size={isFirst ? 104 : 64} />
      <div className="min-w-0">
        <p
          className={
            isFirst
              ? 'text-[clamp(44px,6.1vw,78px)] leading-[1.1]'
              : 'text-[clamp(36px,4vw,52px)] leading-[1.15]'
          }
        >
          {state === 'overdue' ? <Mark kind="leave" size={isFirst ? 56 : 40} className="mr-4" /> : null}
          <strong>{number}</strong> {words} {clock ? <strong>{clock}</strong> : null}
        </p>
        <p className="text-ink-soft">{since}</p>
      </div>
      <MinutesLeft minutes={minutesLeft} isFirst={isFirst} isOverdue={state === 'overdue'} />
    </li>
  )
}

type MinutesLeftProps = { minutes: number | null; isFirst: boolean; isOverdue: boolean }

function MinutesLeft({ minutes, isFirst, isOverdue }: MinutesLeftProps) {
  if (minutes === null || isOverdue) return null
  const isHours = minutes >= 90
  const figure = isHours ? Math.floor(minutes / 60) : minutes
  return (
    <p className="text-right">
      <strong className={isFirst ? 'block text-[104px] leading-[0.9]' : 'block text-[52px] leading-none'}>
        {figure}
      </strong>
      {isHours ? 'h left' : 'min left'}
    </p>
  )
}
