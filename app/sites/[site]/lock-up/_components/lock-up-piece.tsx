'use client'

import { Button } from '@/app/_components/ui/button'
import { Mark } from '@/app/_components/ui/mark'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { TextLink } from '@/app/_components/ui/text-link'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { LockUp } from '@/lib/lock-up/lock-up'
import { lastsTheNight, nightWords } from '@/lib/lock-up/words'
import { answerWords } from '@/lib/notices/answers'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { useCarryActions } from '../../_components/use-carry-actions'
import type { LockUpActions } from './use-lock-up-actions'

type LockUpPieceProps = {
  carry: Carry
  piece: CarryPiece
  lockUp: LockUp
  reader: Reader
  now: Date
  actions: LockUpActions
  /** The most pressing one has the filled button. */
  isFirst: boolean
  /** It was said that it stays out. */
  isStaying: boolean
  onStay: (stays: boolean) => void
}

/** One piece that is logged as out: is it in, or does it stay? */
export function LockUpPiece({
  carry,
  piece,
  lockUp,
  reader,
  now,
  actions,
  isFirst,
  isStaying,
  onStay,
}: LockUpPieceProps) {
  const { bringBack } = useCarryActions(reader.site)
  const lasts = lastsTheNight(piece, lockUp.morningAt)
  return (
    <li className="border-b border-line py-4 first:pt-0 last:border-b-0 last:pb-0">
      <div className="flex gap-4">
        <PieceOutline outline={piece.outline} isOut />
        <div className="min-w-0">
          <p>
            <TextLink href={`/sites/${reader.site}/carry/${carry.id}`} className="font-semibold">
              {piece.number}
            </TextLink>{' '}
            {piece.title}
          </p>
          <p className="text-label text-ink-soft">
            {piece.isOverdue ? <Mark kind="leave" className="mr-2 align-[-2px]" /> : null}
            {nightWords(piece, lockUp.morningAt, { timeZone: reader.timeZone, now })}
          </p>
        </div>
      </div>
      {may(reader.role, 'carries:do') ? (
        <div className="mt-3 grid grid-cols-2 gap-3 sm:flex">
          <Button
            variant={isFirst && !isStaying ? 'filled' : 'second'}
            aria-label={`It’s in, ${piece.number}`}
            pending={bringBack.pending}
            onClick={() => {
              bringBack.act({ carryId: carry.id, pieceIds: [piece.id] })
            }}
          >
            It’s in
          </Button>
          <Button
            aria-label={`Still out, ${piece.number}`}
            aria-pressed={isStaying}
            onClick={() => {
              onStay(!isStaying)
            }}
          >
            Still out
          </Button>
        </div>
      ) : null}
      {isStaying ? (
        <div className="mt-3 flex flex-col gap-3">
          <p role="status" className="max-w-words">
            {lasts === true
              ? `Noted: ${piece.number} stays out for the night.`
              : `${piece.number} had better not stay out for the night: bring it in, or bag it.`}
          </p>
          {lasts !== true && lockUp.noticeId !== null ? (
            <TellTheHouse noticeId={lockUp.noticeId} number={piece.number} answer={actions.answer} />
          ) : null}
        </div>
      ) : null}
    </li>
  )
}

type TellTheHouseProps = { noticeId: string; number: string; answer: LockUpActions['answer'] }

/** The two answers that keep the question open: somebody is going, or the next one is asked. */
function TellTheHouse({ noticeId, number, answer }: TellTheHouseProps) {
  return (
    <div className="flex flex-wrap gap-3">
      {(['going', 'cant'] as const).map((one) => (
        <Button
          key={one}
          aria-label={`${answerWords[one]}, ${number}`}
          pending={answer.pending}
          onClick={() => {
            answer.act({ noticeId, answer: one })
          }}
        >
          {answerWords[one]}
        </Button>
      ))}
    </div>
  )
}
