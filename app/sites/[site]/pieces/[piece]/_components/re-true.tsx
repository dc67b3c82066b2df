'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import type { PieceDetail } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import { FinalFitForm } from './final-fit-form'

/** For a box: its joint was cut, or cut anew. */
export function ReTrue({ reader, piece }: { reader: Reader; piece: PieceDetail }) {
  const [isOpen, setIsOpen] = useState(false)
  const kind = piece.fittedOn === null ? 'final-fit' : 're-true'
  return (
    <>
      <Button
        className="max-sm:grow"
        onClick={() => {
          setIsOpen(true)
        }}
      >
        {kind === 'final-fit' ? 'Final fit done' : 'Re-trued'}
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={setIsOpen}
        title={kind === 'final-fit' ? `Final fit of ${piece.number}` : `${piece.number}, re-trued`}
      >
        <FinalFitForm
          reader={reader}
          piece={piece}
          kind={kind}
          onDone={() => {
            setIsOpen(false)
          }}
        />
      </Dialog>
    </>
  )
}
