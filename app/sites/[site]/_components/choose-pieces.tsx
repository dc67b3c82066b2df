'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Checkbox } from '@/app/_components/ui/checkbox'
import type { Piece } from '@/lib/pieces/piece'

type ChoosePiecesProps = {
  site: string
  legend: string
  /** Pieces that are there already have no way to go. */
  toRoomId: string
  chosen: readonly string[]
  onChange: (ids: string[]) => void
}

/** The pieces that may be taken, boxes first, each with a line to tick. */
export function ChoosePieces({ site, legend, toRoomId, chosen, onChange }: ChoosePiecesProps) {
  const { data } = useSiteQuery<{ items: Piece[] }>({
    site,
    area: 'pieces',
    key: ['for-carry'],
    path: '/pieces?sort=number&limit=200',
  })
  if (data === undefined) return <p role="status">Fetching the pieces.</p>
  const here = data.items.filter((piece) => !piece.isOut && piece.room?.id !== toRoomId)
  const inOrder = here.toSorted((a, b) => Number(b.stage === 'box') - Number(a.stage === 'box'))
  if (inOrder.length === 0) return <p>Every piece is out, or there already.</p>
  return (
    <fieldset>
      <legend className="mb-1 font-semibold">{legend}</legend>
      <div className="max-h-80 divide-y divide-line overflow-y-auto border-y border-line">
        {inOrder.map((piece) => (
          <Checkbox
            key={piece.id}
            label={`${piece.number}, ${piece.title}`}
            hint={piece.room?.name}
            checked={chosen.includes(piece.id)}
            onChange={(event) => {
              const { checked } = event.target
              onChange(checked ? [...chosen, piece.id] : chosen.filter((id) => id !== piece.id))
            }}
          />
        ))}
      </div>
    </fieldset>
  )
}
