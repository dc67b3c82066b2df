'use client'

import { X } from 'lucide-react'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { ControlSentence, SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { formatDuration } from '@/lib/format/times'
import type { Piece } from '@/lib/pieces/piece'
import type { Room } from '@/lib/rooms/room'
import type { UnitSystem } from '@/lib/sites/site'
import { stays, stayWords } from '../../_components/stays'
import { listedOutline } from './listed-outline'
import { type CarryForm, OTHER_AIR, type SetCarryForm, sinces } from './carry-form-state'

type CarrySentenceProps = {
  form: CarryForm
  setForm: SetCarryForm
  pieces: readonly Piece[]
  chosen: readonly Piece[]
  rooms: readonly Room[]
  room: Room | undefined
  units: UnitSystem
  /** The planned time until another is typed. */
  defaultAt: string
}

/** A carry as a sentence, whose words are the controls. */
export function CarrySentence(props: CarrySentenceProps) {
  const { form, setForm, pieces, chosen, rooms, room, units, defaultAt } = props
  const isNow = form.mode === 'now'
  const isOther = form.to === OTHER_AIR
  return (
    <SegmentedTabs
      label="When it goes"
      value={form.mode}
      onValueChange={(mode) => {
        void setForm({
          mode: mode === 'plan' ? 'plan' : 'now',
        })
      }}
      segments={[
        { value: 'now', label: 'Going now' },
        { value: 'plan', label: 'Plan' },
      ]}
    >
      <div className="flex flex-col gap-3">
        <ControlSentence>
          <span>Take</span>
          {chosen.map((piece) => (
            <span
              key={piece.id}
              className="inline-flex min-h-11 items-center gap-2 rounded border border-edge bg-board pl-2 text-body font-semibold"
            >
              <PieceOutline outline={listedOutline(piece)} size={26} />
              {piece.number}
              <button
                type="button"
                aria-label={`Leave ${piece.number} out of it`}
                className="flex size-11 items-center justify-center"
                onClick={() => {
                  void setForm({ pieces: form.pieces.filter((id) => id !== piece.id) })
                }}
              >
                <X aria-hidden="true" size={18} strokeWidth={1.5} />
              </button>
            </span>
          ))}
          <AddPiece
            pieces={pieces.filter((piece) => !form.pieces.includes(piece.id))}
            isFirst={chosen.length === 0}
            onAdd={(id) => {
              void setForm({ pieces: [...form.pieces, id] })
            }}
          />
        </ControlSentence>
        <ControlSentence>
          <span>
            from <strong>{fromWords(chosen)}</strong> to
          </span>
          <SentenceSelect
            label="The room it goes to"
            value={isOther ? OTHER_AIR : (room?.id ?? '')}
            onChange={(event) => {
              void setForm({ to: event.target.value })
            }}
          >
            {rooms.map((option) => (
              <option key={option.id} value={option.id}>
                {option.name}
              </option>
            ))}
            <option value={OTHER_AIR}>another air: a show, a van, a gallery</option>
          </SentenceSelect>
          {isOther ? <OtherAir form={form} setForm={setForm} units={units} /> : null}
          {isNow ? (
            <SentenceSelect
              label="When it went"
              value={String(form.since)}
              onChange={(event) => {
                void setForm({ since: Number(event.target.value) })
              }}
            >
              {sinces.map((minutes) => (
                <option key={minutes} value={minutes}>
                  {minutes === 0 ? 'now' : `${formatDuration(minutes)} ago`}
                </option>
              ))}
            </SentenceSelect>
          ) : (
            <>
              <span>at</span>
              <SentenceInput
                label="When it is to go"
                type="datetime-local"
                value={form.at ?? defaultAt}
                onChange={(event) => {
                  void setForm({ at: event.target.value })
                }}
              />
            </>
          )}
          <span>for</span>
          <SentenceSelect
            label="How long it stays"
            value={String(form.stay)}
            onChange={(event) => {
              void setForm({ stay: Number(event.target.value) })
            }}
          >
            {[...new Set([...stays, form.stay])]
              .toSorted((a, b) => a - b)
              .map((minutes) => (
                <option key={minutes} value={minutes}>
                  {stayWords(minutes)}
                </option>
              ))}
          </SentenceSelect>
        </ControlSentence>
      </div>
    </SegmentedTabs>
  )
}

/** Air that no room of the site has, typed into the sentence. */
function OtherAir({ form, setForm, units }: Pick<CarrySentenceProps, 'form' | 'setForm' | 'units'>) {
  return (
    <>
      <SentenceInput
        label="What that place is called"
        placeholder="the show"
        maxLength={40}
        value={form.place}
        onChange={(event) => {
          void setForm({ place: event.target.value })
        }}
      />
      <span>at</span>
      <SentenceInput
        label="Temperature there"
        inputMode="decimal"
        unit={units === 'metric' ? '°C' : '°F'}
        value={form.temperature}
        onChange={(event) => {
          void setForm({ temperature: event.target.value })
        }}
      />
      <span>and</span>
      <SentenceInput
        label="Humidity there"
        inputMode="decimal"
        unit="% RH"
        value={form.humidity}
        onChange={(event) => {
          void setForm({ humidity: event.target.value })
        }}
      />
    </>
  )
}

function fromWords(chosen: readonly Piece[]): string {
  const names = [...new Set(chosen.map((piece) => piece.room?.name ?? 'a place not known'))]
  if (names.length === 0) return 'where it is'
  return names.length === 1 ? (names[0] ?? '') : 'where they are'
}

type AddPieceProps = { pieces: readonly Piece[]; isFirst: boolean; onAdd: (id: string) => void }

/** Boxes come first: they are what a carry is asked about. What is out already can't go out again. */
function AddPiece({ pieces, isFirst, onAdd }: AddPieceProps) {
  const here = pieces.filter((piece) => !piece.isOut)
  const boxes = here.filter((piece) => piece.stage === 'box')
  const others = here.filter((piece) => piece.stage !== 'box')
  const options = (list: readonly Piece[]) =>
    list.map((piece) => (
      <option key={piece.id} value={piece.id}>
        {piece.number}, {piece.title}
        {piece.room ? `, ${piece.room.name}` : ''}
      </option>
    ))
  return (
    <SentenceSelect
      label={isFirst ? 'Choose a piece' : 'Add a piece'}
      value=""
      onChange={(event) => {
        if (event.target.value !== '') onAdd(event.target.value)
      }}
    >
      <option value="">{isFirst ? 'choose a piece' : 'add'}</option>
      {boxes.length > 0 ? <optgroup label="Boxes">{options(boxes)}</optgroup> : null}
      {others.length > 0 ? <optgroup label="Blanks">{options(others)}</optgroup> : null}
    </SentenceSelect>
  )
}
