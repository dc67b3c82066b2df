'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { learnedWords } from '@/lib/pieces/learned-words'
import type { PieceOutcomes } from '@/lib/pieces/outcome'
import type { Reader } from '@/lib/sites/reader'
import { TurnedAsk } from './turned-ask'

type TurnedAfterCarryProps = {
  reader: Reader
  pieceId: string
  number: string
  carryId: string
  className?: string
}

/** Asked once for each box that came back, unless it has been told or is passed over. */
export function TurnedAfterCarry({ reader, pieceId, number, carryId, className }: TurnedAfterCarryProps) {
  const [isSkipped, setIsSkipped] = useState(false)
  const { data } = useSiteQuery<PieceOutcomes>({
    site: reader.site,
    area: 'pieces',
    key: ['outcomes', pieceId],
    path: `/pieces/${pieceId}/outcomes`,
  })
  if (isSkipped || data === undefined) return null
  const told = data.items.find((outcome) => outcome.carryId === carryId && !outcome.isUndone)
  return (
    <div className={className}>
      <TurnedAsk
        site={reader.site}
        pieceId={pieceId}
        carryId={carryId}
        question={`How did the lid of ${number} turn?`}
        told={told}
        onSkip={() => {
          setIsSkipped(true)
        }}
      />
      {told && data.learned ? (
        <p className="mt-1 text-label text-ink-soft">{learnedWords(data.learned)}</p>
      ) : null}
    </div>
  )
}
