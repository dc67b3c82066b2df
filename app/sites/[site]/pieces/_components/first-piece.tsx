'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useRouter } from 'next/navigation'
import { useForm, useWatch } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { Choice } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { Select } from '@/app/_components/ui/select'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import { fitGradeSchema, newPieceSchema, type NewPiece, type Piece, stageSchema } from '@/lib/pieces/piece'
import { fitGradeWords, stageWords } from '@/lib/pieces/wording'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { WoodChoice } from '@/lib/wood/wood'
import { FirstAnswerLine, type RoomWithAir } from './first-answer-line'
import { LengthInput, lengthError } from './length-input'
import { WoodCare } from './wood-care'
import { WoodField } from './wood-field'

export type RoomChoice = { id: string; name: string; mark: number }

type FirstPieceProps = {
  reader: Reader
  rooms: readonly RoomWithAir[]
  woods: readonly WoodChoice[]
  /** The next number in the maker's own row, offered and not imposed. */
  number: string
  roomId?: string
}

const grades = fitGradeSchema.options.map((value) => ({ value, label: fitGradeWords[value].label }))
const stages = stageSchema.options.map((value) => ({ value, label: stageWords[value] })).reverse()

/** Five answers make a piece; all else is taken as usual, shown as assumed, and can be put right later. */
export function FirstPiece({ reader, rooms, woods, number, roomId }: FirstPieceProps) {
  const router = useRouter()
  const form = useForm({
    resolver: zodResolver(newPieceSchema),
    defaultValues: {
      number,
      wood: null as string | null,
      woodKind: 'plain' as NewPiece['woodKind'],
      jointDiameterMm: null as number | null,
      fitGrade: null as NewPiece['fitGrade'],
      roomId: roomId ?? rooms[0]?.id ?? '',
      stage: 'box' as NewPiece['stage'],
    },
  })
  const values = useWatch({ control: form.control })
  const isBox = values.stage === 'box'
  const wood = woods.find((one) => one.slug === values.wood)
  // Wild grain moves its own way, and stabilised wood isn't worked out to move: no time out is told for either.
  const isReckoned = values.woodKind !== 'wild' && values.woodKind !== 'stabilised'
  const keep = useAction<{ body: NewPiece; isGoingOut: boolean }, Piece>({
    run: ({ body }, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/pieces`, { method: 'POST', body, idempotencyKey }),
    invalidates: [siteKey(reader.site, 'pieces'), siteKey(reader.site, 'frame'), siteKey(reader.site, 'now')],
    done: (piece) => `${piece.number} is kept`,
    onDone: (piece, { isGoingOut }) => {
      const base = `/sites/${reader.site}`
      router.push(isGoingOut ? `${base}/carry?pieces=${piece.id}` : `${base}/pieces/${piece.id}`)
    },
    errors: 'inline',
  })
  const submit = (isGoingOut: boolean) =>
    form.handleSubmit((body) => {
      keep.act({ body: body.stage === 'box' ? body : { ...body, fitGrade: null }, isGoingOut })
    })
  const errorOf = (field: 'number' | 'wood' | 'jointDiameterMm' | 'fitGrade' | 'roomId') =>
    form.formState.errors[field]?.message ?? keep.problem?.errorOf(field)
  const general =
    keep.error && !keep.problem?.errors.length
      ? (keep.problem?.detail ?? 'No answer came. Nothing was lost; press again.')
      : undefined

  return (
    <form onSubmit={submit(false)} noValidate aria-label="A new piece" className="flex flex-col gap-7">
      <PageSentence>Five answers, {isBox ? 'box' : 'piece'} in hand. The rest can wait.</PageSentence>
      {general ? <Callout tone="warn" mark="silent" title={general} announce /> : null}
      <Sheet className="max-w-[40rem]">
        <div className="flex flex-col gap-5">
          <Choice
            label="What is it?"
            options={stages}
            columns={3}
            value={values.stage}
            onChange={(stage) => {
              form.setValue('stage', stage, { shouldDirty: true })
            }}
          />
          <Field label="Its number" error={errorOf('number')} hint="Pencil it inside the base.">
            <Input autoComplete="off" maxLength={12} {...form.register('number')} />
          </Field>
          <WoodField
            label="Its wood"
            error={errorOf('wood')}
            hint="Common or Latin name. Not sure? Say so: the doubt gets wider, that’s all."
            woods={woods}
            value={values.wood ?? null}
            onChange={(chosen) => {
              form.setValue('wood', chosen, { shouldDirty: true })
            }}
            kind={values.woodKind ?? 'plain'}
            onKindChange={(kind) => {
              form.setValue('woodKind', kind, { shouldDirty: true })
            }}
          />
          {values.wood ? <WoodCare wood={wood} /> : null}
          <Field
            label={isBox ? 'Joint, outside of the spigot, straight across' : 'Diameter, straight across'}
            error={lengthError(values.jointDiameterMm, errorOf('jointDiameterMm'))}
            hint="Measure along the rings. Leave it empty if you can’t measure it now: it is then not worked out."
          >
            <LengthInput
              valueMm={values.jointDiameterMm ?? null}
              units={reader.units}
              onChange={(jointDiameterMm) => {
                form.setValue('jointDiameterMm', jointDiameterMm, {
                  shouldDirty: true,
                  shouldValidate: form.formState.isSubmitted,
                })
              }}
            />
          </Field>
          {isBox ? (
            <Choice
              label="How does the lid fit, by hand?"
              options={grades}
              columns={3}
              value={values.fitGrade ?? undefined}
              onChange={(fitGrade) => {
                form.setValue('fitGrade', fitGrade, { shouldDirty: true })
              }}
              hint={
                values.fitGrade
                  ? fitGradeWords[values.fitGrade].feel
                  : 'Not sure? Leave it: the doubt gets wider.'
              }
              error={errorOf('fitGrade')}
            />
          ) : null}
          <WhereIsIt
            rooms={rooms}
            value={values.roomId ?? ''}
            onChange={(id) => {
              form.setValue('roomId', id, { shouldDirty: true })
            }}
            error={errorOf('roomId')}
          />
        </div>
      </Sheet>
      {isBox && isReckoned ? (
        <div className="max-w-[40rem]">
          <FirstAnswerLine
            answers={{
              wood: values.wood ?? null,
              ownFigures: wood,
              jointDiameterMm: inRange(values.jointDiameterMm),
              fitGrade: values.fitGrade ?? null,
            }}
            here={rooms.find((room) => room.id === values.roomId)}
            rooms={rooms}
          />
        </div>
      ) : null}
      <div className="flex flex-wrap gap-3 px-4 sm:px-0">
        <Button type="submit" variant="filled" pending={keep.pending} className="max-sm:grow">
          Keep it
        </Button>
        {may(reader.role, 'carries:do') ? (
          <Button pending={keep.pending} onClick={() => void submit(true)()} className="max-sm:grow">
            It’s going out now
          </Button>
        ) : null}
      </div>
    </form>
  )
}

/** A size that the form would refuse is no size to reckon with. */
const inRange = (diameterMm: number | null | undefined): number | null =>
  newPieceSchema.shape.jointDiameterMm.safeParse(diameterMm).data ?? null

type WhereIsItProps = {
  rooms: readonly RoomChoice[]
  value: string
  onChange: (roomId: string) => void
  error: string | undefined
}

/** A few rooms as cells to press; many as a list. */
function WhereIsIt({ rooms, value, onChange, error }: WhereIsItProps) {
  if (rooms.length <= 6) {
    return (
      <Choice
        label="Where is it now?"
        options={rooms.map((room) => ({
          value: room.id,
          label: (
            <span className="inline-flex items-center gap-2">
              <RoomMark mark={room.mark} />
              {room.name}
            </span>
          ),
        }))}
        value={value}
        onChange={onChange}
        error={error}
      />
    )
  }
  return (
    <Field label="Where is it now?" error={error}>
      <Select
        value={value}
        onChange={(event) => {
          onChange(event.target.value)
        }}
      >
        {rooms.map((room) => (
          <option key={room.id} value={room.id}>
            {room.name}
          </option>
        ))}
      </Select>
    </Field>
  )
}
