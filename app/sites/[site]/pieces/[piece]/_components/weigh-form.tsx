'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { NumberInput } from '@/app/_components/ui/number-input'
import { Select } from '@/app/_components/ui/select'
import { formatMass } from '@/lib/format/figures'
import { instantOfLocalField, localFieldValue } from '@/lib/format/local-time'
import { formatMassFigure, parseMassG } from '@/lib/format/mass-entry'
import { scaleSteps } from '@/lib/format/scale-steps'
import type { NewWeighing } from '@/lib/pieces/event'
import { oddWeight } from '@/lib/seasoning/odd-weight'
import type { Reader } from '@/lib/sites/reader'

export type WeighingInput = Partial<NewWeighing> & { grams: number }

type WeighFormProps = {
  reader: Reader
  now: Date
  /** The last weight of the current series, g. */
  lastG: number | undefined
  /** Ask for the step of the scale: nobody has told it yet. */
  asksStep: boolean
  pending: boolean
  /** What the server or the way to it had against it. */
  refusal: string | undefined
  onWeigh: (input: WeighingInput) => void
}

/** What it weighs, when, and once for the place how fine the scale is. Nothing is refused for being odd, only asked about. */
export function WeighForm({ reader, now, lastG, asksStep, pending, refusal, onWeigh }: WeighFormProps) {
  const { units, timeZone } = reader
  const [openedAs] = useState(() => localFieldValue(now, timeZone))
  const [mass, setMass] = useState('')
  const [step, setStep] = useState('')
  const [when, setWhen] = useState(openedAs)
  const [error, setError] = useState<string>()
  const [asked, setAsked] = useState<number>()
  const grams = parseMassG(mass, units)
  const odd =
    asked !== undefined && asked === grams && lastG !== undefined && grams > 0
      ? oddWeight(grams, lastG)
      : undefined

  const send = (of: number) => {
    const at = instantOfLocalField(when, timeZone)
    if (when !== openedAs && at === undefined) {
      setError('That is not a day and a time.')
      return
    }
    onWeigh({
      grams: of,
      ...(when === openedAs || at === undefined ? {} : { at: at.toISOString() }),
      ...(step === '' ? {} : { stepG: Number(step) }),
    })
  }
  const submit = () => {
    setError(undefined)
    if (grams === null || !(grams > 0)) {
      setError(`A weight above 0, such as ${units === 'metric' ? '183 or 183.5' : '6.45'}.`)
      return
    }
    if (lastG !== undefined && asked !== grams && oddWeight(grams, lastG) !== undefined) {
      setAsked(grams)
      return
    }
    send(grams)
  }

  return (
    <form
      noValidate
      aria-label="Weigh it"
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault()
        submit()
      }}
    >
      <Field
        label="It weighs"
        error={error ?? refusal}
        hint={lastG === undefined ? undefined : `${formatMass(lastG, units)} the last time`}
      >
        <NumberInput
          unit={units === 'metric' ? 'g' : 'oz'}
          value={mass}
          autoFocus
          className="min-h-16 text-[2rem] font-semibold"
          onChange={(event) => {
            setMass(event.target.value)
          }}
        />
      </Field>
      {odd === undefined || grams === null ? null : (
        <Callout
          tone="warn"
          mark="weigh"
          announce
          title={`It weighed ${formatMass(odd.lastG, units)} the last time. Is ${formatMass(grams, units)} right?`}
        >
          <div className="mt-2 flex flex-wrap gap-3">
            {odd.perhapsG === undefined ? null : (
              <Button
                onClick={() => {
                  setMass(formatMassFigure(odd.perhapsG ?? null, units))
                }}
              >
                No, {formatMass(odd.perhapsG, units)}
              </Button>
            )}
            <Button type="submit" pending={pending}>
              Yes, keep {formatMass(grams, units)}
            </Button>
          </div>
        </Callout>
      )}
      <Field label="When">
        <Input
          type="datetime-local"
          value={when}
          max={openedAs}
          onChange={(event) => {
            setWhen(event.target.value)
          }}
        />
      </Field>
      {asksStep ? (
        <Field
          label="The smallest step that your scale shows"
          hint="Asked once, and remembered for this place. Taken as 1 g until told."
        >
          <Select
            value={step}
            onChange={(event) => {
              setStep(event.target.value)
            }}
          >
            <option value="">Not told</option>
            {scaleSteps(units, null).map(({ stepG, words }) => (
              <option key={stepG} value={String(stepG)}>
                {words}
              </option>
            ))}
          </Select>
        </Field>
      ) : null}
      {odd === undefined ? (
        <Button type="submit" variant="filled" pending={pending}>
          Keep this weight
        </Button>
      ) : null}
    </form>
  )
}
