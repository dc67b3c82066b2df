'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { useAction } from '@/app/_components/use-action'
import type { PieceDetail } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'

/** Off the list and out of every warning, with all that is known of it kept; and back again. */
export function PutAway({ reader, piece }: { reader: Reader; piece: PieceDetail }) {
  const [isAsking, setIsAsking] = useState(false)
  const path = `/sites/${reader.site}/pieces/${piece.id}`
  const invalidates = [
    siteKey(reader.site, 'pieces'),
    siteKey(reader.site, 'now'),
    siteKey(reader.site, 'frame'),
  ]
  const putAway = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(path, { method: 'DELETE', ifMatch: piece.version }),
    invalidates,
    done: `${piece.number} is put away`,
    onDone: () => {
      setIsAsking(false)
    },
  })
  const bringOut = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`${path}/restore`, { method: 'POST' }),
    invalidates,
    done: `${piece.number} is among the pieces again`,
  })
  if (piece.isArchived === true) {
    return (
      <Button
        variant="filled"
        pending={bringOut.pending}
        onClick={() => {
          bringOut.act({})
        }}
      >
        Bring it out again
      </Button>
    )
  }
  if (piece.isOut) return null
  return (
    <>
      <Button
        variant="quiet"
        onClick={() => {
          setIsAsking(true)
        }}
      >
        Put it away
      </Button>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`Put ${piece.number} away?`}
        confirmLabel="Put it away"
        pending={putAway.pending}
        onConfirm={() => {
          putAway.act({})
        }}
      >
        <p>
          Sold, given or broken: it leaves the list and its number is free again. What is known of it stays,
          and it can be brought out again from this page.
        </p>
      </ConfirmDialog>
    </>
  )
}
