'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import type { UnitSystem } from '@/lib/sites/site'
import { TypedReadingForm } from '../../../_components/typed-reading-form'

type TypeReadingProps = { site: string; room: { id: string; name: string }; units: UnitSystem }

export function TypeReading({ site, room, units }: TypeReadingProps) {
  const [open, setOpen] = useState(false)
  return (
    <>
      <Button
        onClick={() => {
          setOpen(true)
        }}
      >
        Type in a reading
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title={`What a dial shows in ${room.name}`}
        description="Let it hang there for half an hour first. It counts from now."
      >
        <TypedReadingForm
          site={site}
          room={room}
          units={units}
          onDone={() => {
            setOpen(false)
          }}
        />
      </Dialog>
    </>
  )
}
