'use client'

import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { Button } from '@/app/_components/ui/button'
import { Caution } from '@/app/_components/ui/caution'
import { Choice } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { fitGradeSchema, type PieceChange } from '@/lib/pieces/piece'
import { fitGradeWords } from '@/lib/pieces/wording'
import { type EditFieldsProps, emptyIsNull, LengthField, ListField, RoomField } from './edit-fields'

const grades = fitGradeSchema.options.map((value) => ({ value, label: fitGradeWords[value].label }))

export function FitFields({ reader, rooms, problem }: EditFieldsProps) {
  const { control, register, formState } = useFormContext<PieceChange>()
  const [stage, fitGrade, lidForm] = useWatch({ control, name: ['stage', 'fitGrade', 'lidForm'] })
  const shared = { problem, reader }
  return (
    <div className="grid gap-5 md:grid-cols-2">
      <LengthField
        name="jointDiameterMm"
        label="Joint, outside of the spigot, straight across"
        hint="Measure along the rings."
        {...shared}
      />
      {stage === 'box' ? (
        <>
          <LengthField name="wallMm" label="Wall at the spigot" {...shared} />
          <LengthField name="spigotMm" label="Length of the spigot" {...shared} />
          <LengthField name="lidMm" label="Thickness of the lid" {...shared} />
          <ListField
            name="spigotOn"
            label="The spigot is"
            options={{ base: 'on the base: the lid goes over', lid: 'on the lid: it drops in' }}
          />
          <ListField name="lidForm" label="The lid is" options={{ plug: 'solid', hollow: 'hollow' }} />
          {lidForm === 'hollow' ? (
            <LengthField name="lidWallMm" label="Wall of the lid" hint="Round the recess." {...shared} />
          ) : null}
          <div className="md:col-span-2">
            <Controller
              control={control}
              name="fitGrade"
              render={({ field, fieldState }) => (
                <Choice
                  label="How does the lid fit, by hand?"
                  columns={3}
                  options={grades}
                  value={field.value ?? undefined}
                  onChange={field.onChange}
                  error={fieldState.error?.message ?? problem?.errorOf('fitGrade')}
                  hint={fitGrade ? fitGradeWords[fitGrade].feel : 'Not told: the doubt is wider.'}
                />
              )}
            />
            <ForgetGrade />
          </div>
          <LengthField
            name="clearanceMm"
            label="Clearance, if you measured it"
            hint="Socket less spigot, across."
            {...shared}
          />
          <LengthField
            name="allowanceMm"
            label="How much of it may go"
            hint="Never the whole clearance: what may go before the fit is no longer what you made."
            {...shared}
          />
          <RoomField name="fittedRoomId" label="Fitted in" rooms={rooms} />
          <Field
            label="Fitted on"
            hint="The month counts; any day of it will do."
            error={formState.errors.fittedOn?.message ?? problem?.errorOf('fittedOn')}
          >
            <Input type="date" {...register('fittedOn', { setValueAs: emptyIsNull })} />
          </Field>
          <div className="md:col-span-2">
            <Caution>
              A swollen lid is never forced, levered or heated. Line the grain up, keep the parts side by
              side, and try it cold in about two days. It usually comes back; not always.
            </Caution>
          </div>
        </>
      ) : null}
    </div>
  )
}

/** A radio that was pressed can't be unpressed; this takes the answer back. */
function ForgetGrade() {
  const { control, setValue } = useFormContext<PieceChange>()
  const grade = useWatch({ control, name: 'fitGrade' })
  if (grade === null || grade === undefined) return null
  return (
    <Button
      variant="link"
      onClick={() => {
        setValue('fitGrade', null, { shouldDirty: true })
      }}
    >
      I don’t know how it fits
    </Button>
  )
}
