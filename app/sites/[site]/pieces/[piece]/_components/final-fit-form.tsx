'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Choice } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { instantOfLocalField, localFieldValue } from '@/lib/format/local-time'
import { type FitGrade, fitGradeSchema, type PieceDetail } from '@/lib/pieces/piece'
import { fitGradeWords } from '@/lib/pieces/wording'
import type { Reader } from '@/lib/sites/reader'
import { LengthInput, lengthError } from '../../_components/length-input'
import { usePieceRecord } from './use-piece-record'

type FinalFitFormProps = {
  reader: Reader
  piece: PieceDetail
  kind: 'final-fit' | 're-true'
  /** Of the joint, where the page has asked for it already; else this form asks. */
  diameterMm?: number | null
  onDone?: () => void
}

const grades = fitGradeSchema.options.map((value) => ({ value, label: fitGradeWords[value].label }))

/** The joint has just been cut: how the lid fits. Room, hour and moisture are kept with it by the server. */
export function FinalFitForm({ reader, piece, kind, diameterMm: toldMm, onDone }: FinalFitFormProps) {
  const [grade, setGrade] = useState<FitGrade>()
  const [clearanceMm, setClearance] = useState<number | null>(null)
  const [typedMm, setDiameter] = useState(piece.jointDiameterMm)
  const diameterMm = toldMm === undefined ? typedMm : toldMm
  const [when, setWhen] = useState('')
  const [refusal, setRefusal] = useState('')
  const { enter } = usePieceRecord(reader.site, piece.id)
  const problem = enter.problem
  const submit = () => {
    const at = when === '' ? undefined : instantOfLocalField(when, reader.timeZone)
    if (grade === undefined && clearanceMm === null)
      return setRefusal('Say how the lid fits by hand, or what clearance you measured.')
    if (diameterMm === null) return setRefusal('Say how wide the joint is.')
    if (Number.isNaN(diameterMm) || Number.isNaN(clearanceMm))
      return setRefusal('Lengths are numbers, such as 62 or 62.5.')
    setRefusal('')
    enter.act(
      {
        kind,
        ...(at === undefined ? {} : { at: at.toISOString() }),
        fitGrade: grade ?? null,
        clearanceMm,
        ...(diameterMm === piece.jointDiameterMm ? {} : { jointDiameterMm: diameterMm }),
      },
      { onSuccess: () => onDone?.() },
    )
  }
  return (
    <form
      className="flex flex-col gap-4"
      noValidate
      onSubmit={(event) => {
        event.preventDefault()
        submit()
      }}
    >
      <Choice
        label="How does the lid fit now, by hand?"
        columns={3}
        options={grades}
        value={grade}
        onChange={setGrade}
        error={problem?.errorOf('fitGrade')}
        hint={grade ? fitGradeWords[grade].feel : 'Try it with the grain lined up and a quarter turn on.'}
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field
          label="Clearance, if you measured it"
          hint="Socket less spigot, across."
          error={lengthError(clearanceMm, problem?.errorOf('clearanceMm'))}
        >
          <LengthInput valueMm={null} onChange={setClearance} units={reader.units} />
        </Field>
        {toldMm === undefined ? (
          <Field
            label="Joint, outside of the spigot"
            error={lengthError(diameterMm, problem?.errorOf('jointDiameterMm'))}
          >
            <LengthInput valueMm={piece.jointDiameterMm} onChange={setDiameter} units={reader.units} />
          </Field>
        ) : null}
        <Field
          label="When, if not just now"
          hint="Before its record begins, its keep room’s month is taken, and the doubt is wide."
          error={problem?.errorOf('at')}
        >
          <Input
            type="datetime-local"
            value={when}
            max={localFieldValue(reader.at, reader.timeZone)}
            onChange={(event) => {
              setWhen(event.target.value)
            }}
          />
        </Field>
      </div>
      {refusal || (enter.error && problem?.errors.length !== 1) ? (
        <p role="alert" className="text-label text-warn">
          {refusal || problem?.detail || 'No answer came. Nothing was changed; try again.'}
        </p>
      ) : null}
      <div>
        <Button type="submit" variant="filled" pending={enter.pending} className="max-sm:w-full">
          {kind === 'final-fit' ? 'Final fit done' : 'Re-trued'}
        </Button>
      </div>
      <p className="max-w-words text-label text-ink-soft">
        Lidfast keeps the room, the hour and the % MC of ring and lid with it. What the lid may lose counts
        from there, and is taken from how it fits now.
      </p>
    </form>
  )
}
