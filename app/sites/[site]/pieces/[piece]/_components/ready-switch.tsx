'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Switch } from '@/app/_components/ui/switch'
import { useAction } from '@/app/_components/use-action'
import type { PieceDetail } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'

/** The maker's word that weights alone decide. It is marked wherever it counts. */
export function ReadySwitch({ reader, piece }: { reader: Reader; piece: PieceDetail }) {
  const change = useAction<boolean, unknown>({
    run: (isReadyByWeight) =>
      apiFetch(`/sites/${reader.site}/pieces/${piece.id}`, {
        method: 'PATCH',
        body: { isReadyByWeight },
        ifMatch: piece.version,
      }),
    invalidates: [siteKey(reader.site, 'pieces'), siteKey(reader.site, 'now')],
  })
  const mayChange = may(reader.role, 'pieces:change') && piece.isArchived !== true
  if (!mayChange && !piece.isReadyByWeight) return null
  return (
    <div className="mt-4 flex flex-wrap items-center justify-between gap-x-4 border-t border-line pt-3">
      <div className="max-w-words">
        <p className="font-semibold">Ready by weight alone</p>
        <p className="text-label text-ink-soft">
          {piece.isReadyByWeight
            ? 'Its maker lets the weights decide: its MC is not asked for. Marked as such wherever it says ready.'
            : 'The weights decide, and the MC is not asked for. It will be marked.'}
        </p>
      </div>
      {mayChange ? (
        <Switch
          label="Ready by weight alone"
          checked={piece.isReadyByWeight}
          disabled={change.pending}
          onCheckedChange={change.act}
        />
      ) : null}
    </div>
  )
}
