'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { learnedWords } from '@/lib/pieces/learned-words'
import type { PieceOutcomes } from '@/lib/pieces/outcome'
import type { Reader } from '@/lib/sites/reader'
import { TurnedAsk } from './turned-ask'
import { useCarryActions } from './use-carry-actions'

type TurnedAfterCarryProps = {
  reader: Reader
  pieceId: string
  number: string
  carryId: string
  /** It was passed over on some screen. */
  isAskSkipped: boolean
  className?: string
}

/** Asked once for each box that came back, unless it has been told or is passed over. */
export function TurnedAfterCarry({
  reader,
  pieceId,
  number,
  carryId,
  isAskSkipped,
  className,
}: TurnedAfterCarryProps) {
  const { skipAsk } = useCarryActions(reader.site)
  const { data } = useSiteQuery<PieceOutcomes>({
    site: reader.site,
    area: 'pieces',
    key: ['outcomes', pieceId],
    path: `/pieces/${pieceId}/outcomes`,
  })
  if (data === undefined) return null
  const told = data.items.find((outcome) => outcome.carryId === carryId && !outcome.isUndone)
  if (told === undefined && (isAskSkipped || skipAsk.done)) return null
  return (
    <div className={className}>
      <TurnedAsk
        site={reader.site}
        pieceId={pieceId}
        carryId={carryId}
        question={`How did the lid of ${number} turn?`}
        told={told}
        onSkip={() => {
          skipAsk.act({ carryId, pieceId })
        }}
      />
      {told && data.learned ? (
        <p className="mt-1 text-label text-ink-soft">{learnedWords(data.learned)}</p>
      ) : null}
    </div>
  )
}
