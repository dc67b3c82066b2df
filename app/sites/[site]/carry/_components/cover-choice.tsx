'use client'

import { Choice } from '@/app/_components/ui/choice'
import type { CarryCheckAnswer } from '@/lib/carry/carry-answer'
import { piecesInCover, worstVerdict } from '@/lib/carry/ways'
import { formatMoment } from '@/lib/format/times'
import { type Cover, coverWords } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { covers } from './carry-form-state'

type CoverChoiceProps = {
  cover: Cover
  onChange: (cover: Cover) => void
  answer: CarryCheckAnswer | undefined
  reader: Reader
  now: Date
}

/** How it sits out there, and under each cover how long all of them keep their fit in it. */
export function CoverChoice({ cover, onChange, answer, reader, now }: CoverChoiceProps) {
  return (
    <Choice
      label="How it sits out there"
      value={cover}
      onChange={onChange}
      options={covers.map((option) => ({
        value: option,
        label: sentenceCase(coverWords[option]),
        detail: answer ? wordsOf(answer, option, reader, now) : undefined,
      }))}
    />
  )
}

function wordsOf(answer: CarryCheckAnswer, cover: Cover, reader: Reader, now: Date): string | undefined {
  const pieces = piecesInCover(answer.pieces, answer.cover, cover)
  if (pieces === undefined || pieces.length === 0) return undefined
  const worst = worstVerdict(pieces)
  if (worst === 'fine') return 'the whole stay'
  if (worst === 'leave') return 'leave it where it is'
  const first = pieces
    .flatMap((piece) => (piece.verdict === 'fine' ? [] : (piece.earlyAt ?? [])))
    .toSorted()[0]
  return first === undefined ? 'keep it short' : `back by ${formatMoment(first, reader.timeZone, now)}`
}

export const sentenceCase = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}`
