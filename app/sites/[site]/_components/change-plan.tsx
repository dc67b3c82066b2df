'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import type { Carry } from '@/lib/carry/carry'
import { instantOfLocalField, localFieldValue } from '@/lib/format/local-time'
import { coverSchema, coverWords } from '@/lib/pieces/piece'
import { stays, stayWords } from './stays'
import type { CarryActions } from './use-carry-actions'

type ChangePlanProps = { carry: Carry; actions: CarryActions; timeZone: string; now: Date }

/** Another hour, another stay or another cover for a carry that has not gone yet. */
export function ChangePlan({ carry, actions, timeZone, now }: ChangePlanProps) {
  const [open, setOpen] = useState(false)
  const [at, setAt] = useState('')
  const [stay, setStay] = useState(carry.stayMinutes)
  const [cover, setCover] = useState(carry.cover)
  const plannedAt = instantOfLocalField(at, timeZone)
  const isPast = plannedAt !== undefined && plannedAt < now
  return (
    <>
      <Button
        onClick={() => {
          setAt(localFieldValue(carry.plannedAt, timeZone))
          setStay(carry.stayMinutes)
          setCover(carry.cover)
          setOpen(true)
        }}
      >
        Change the plan
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title="Change the plan">
        <form
          className="flex flex-col gap-4"
          onSubmit={(event) => {
            event.preventDefault()
            if (plannedAt === undefined || isPast) return
            actions.change.act({
              carryId: carry.id,
              version: carry.version,
              change: { plannedAt: plannedAt.toISOString(), stayMinutes: stay, cover },
            })
            setOpen(false)
          }}
        >
          <Field
            label="When it goes"
            error={at !== '' && (plannedAt === undefined || isPast) ? 'A time to come, please.' : undefined}
          >
            <Input
              type="datetime-local"
              required
              value={at}
              onChange={(event) => {
                setAt(event.target.value)
              }}
            />
          </Field>
          <Field label="For how long">
            <Select
              value={String(stay)}
              onChange={(event) => {
                setStay(Number(event.target.value))
              }}
            >
              {[...new Set([...stays, carry.stayMinutes])]
                .toSorted((a, b) => a - b)
                .map((minutes) => (
                  <option key={minutes} value={minutes}>
                    {stayWords(minutes)}
                  </option>
                ))}
            </Select>
          </Field>
          <Field label="How it sits out there">
            <Select
              value={cover}
              onChange={(event) => {
                setCover(coverSchema.parse(event.target.value))
              }}
            >
              {coverSchema.options.map((option) => (
                <option key={option} value={option}>
                  {coverWords[option]}
                </option>
              ))}
            </Select>
          </Field>
          <div>
            <Button type="submit" variant="filled" className="max-sm:w-full">
              Keep the changes
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  )
}
