'use client'

import { apiFetch } from '@/app/_components/api'
import { UndoLine } from '@/app/_components/ui/undo-line'
import { useAction } from '@/app/_components/use-action'
import type { Wood } from '@/lib/wood/wood'
import { woodAreas } from './put-wood-away'

/** Says what was put away, and takes it back within a few seconds. */
export function PutAwayLine({ site, wood, onGone }: { site: string; wood: Wood; onGone: () => void }) {
  const undo = useAction<Record<string, never>, Wood>({
    run: () => apiFetch(`/sites/${site}/species/${wood.slug}/restore`, { method: 'POST' }),
    invalidates: woodAreas(site),
    onDone: onGone,
  })
  return (
    <UndoLine
      pending={undo.pending}
      onUndo={() => {
        undo.act({})
      }}
      onGone={onGone}
    >
      {wood.isOwn
        ? `${wood.commonName} is put away. Pieces made of it keep it.`
        : `${wood.commonName} goes by the table again.`}
    </UndoLine>
  )
}
