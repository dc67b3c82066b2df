import type { PieceDetail } from '@/lib/pieces/piece'
import type { PieceFit } from '@/lib/pieces/piece-fit'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { CutSheet } from './cut-sheet'
import { FinalFitForm } from './final-fit-form'
import { LidSheet } from './lid-sheet'

type FitSheetsProps = { reader: Reader; piece: PieceDetail; initial: PieceFit }

/** Before the joint is cut: may it be, and what became of it. Afterwards: how the lid fits, and may it be cut anew. */
export function FitSheets({ reader, piece, initial }: FitSheetsProps) {
  const mayCut = may(reader.role, 'pieces:change') && piece.isArchived !== true
  if (piece.stage === 'box')
    return (
      <>
        <LidSheet reader={reader} pieceId={piece.id} initial={initial} />
        {mayCut ? (
          <details className="group">
            <summary className="min-h-11 px-4 py-2 font-semibold text-heart sm:px-0">
              May I cut it anew? If the joint is to be re-trued
            </summary>
            <div className="mt-2">
              <CutSheet reader={reader} piece={piece} initial={initial} />
            </div>
          </details>
        ) : null}
      </>
    )
  return (
    <CutSheet reader={reader} piece={piece} initial={initial}>
      {mayCut
        ? (diameterMm) => (
            <>
              <h3 className="mb-3 text-title font-semibold">When you have cut it</h3>
              <FinalFitForm reader={reader} piece={piece} kind="final-fit" diameterMm={diameterMm} />
            </>
          )
        : undefined}
    </CutSheet>
  )
}
