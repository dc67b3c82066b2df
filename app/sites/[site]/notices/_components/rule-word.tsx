'use client'

import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import type { RuleValue } from '@/lib/notices/rule-settings'
import { shownValue, unitWord } from '@/lib/notices/rule-units'
import type { ControlView, RuleList } from '@/lib/notices/rule-view'
import type { UnitSystem } from '@/lib/sites/site'

type Rooms = RuleList['rooms']

type RuleWordProps = {
  control: ControlView
  /** As it stands in the field: a number as typed. */
  value: RuleValue
  units: UnitSystem
  rooms: Rooms
  isWrong: boolean
  onChange: (value: RuleValue) => void
}

/** A changeable word of a rule's sentence. */
export function RuleWord({ control, value, units, rooms, isWrong, onChange }: RuleWordProps) {
  if (control.kind === 'rooms')
    return <RoomWords control={control} value={roomsIn(value)} rooms={rooms} onChange={onChange} />
  if (control.kind === 'choice')
    return (
      <SentenceSelect
        label={control.label}
        value={String(value)}
        onChange={(event) => {
          onChange(event.target.value)
        }}
      >
        {control.options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.words}
          </option>
        ))}
      </SentenceSelect>
    )
  const isNumber = control.kind === 'number'
  return (
    <SentenceInput
      label={control.label}
      type={isNumber ? 'text' : 'time'}
      inputMode={isNumber ? 'decimal' : undefined}
      unit={(isNumber && unitWord(control.unit, units, Number(value))) || undefined}
      value={String(value)}
      aria-invalid={isWrong || undefined}
      onChange={(event) => {
        onChange(event.target.value)
      }}
    />
  )
}

/** Rooms by name, one word each; none named means those that the rule means by itself. */
function RoomWords({
  control,
  value,
  rooms,
  onChange,
}: {
  control: ControlView & { kind: 'rooms' }
  value: readonly string[]
  rooms: Rooms
  onChange: (value: readonly string[]) => void
}) {
  const places = [...value, '']
  return places.map((code, index) => {
    const isLast = index === value.length
    const free = rooms.filter((room) => room.id === code || !value.includes(room.id))
    if (isLast && free.length === 0) return null
    const emptyWords =
      isLast && index > 0 ? 'nowhere else' : index > 0 || value.length > 1 ? 'leave out' : control.noneWords
    return (
      <span key={index}>
        {index > 0 ? ' or ' : ''}
        <SentenceSelect
          label={index === 0 ? control.label : `${control.label}, another`}
          value={code}
          onChange={(event) => {
            const next = [...value]
            if (event.target.value === '') next.splice(index, 1)
            else next[index] = event.target.value
            onChange(next)
          }}
        >
          <option value="">{emptyWords}</option>
          {free.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}
            </option>
          ))}
        </SentenceSelect>
      </span>
    )
  })
}

const roomsIn = (value: RuleValue): readonly string[] =>
  typeof value === 'string' || typeof value === 'number' ? [] : value

/** What a number's field begins with; undefined for another kind of word. */
export const textOfNumber = (control: ControlView, units: UnitSystem): string | undefined =>
  control.kind === 'number' ? shownValue(Number(control.value), control.unit, units) : undefined

/** A word of a rule for those who only read it. */
export function controlWords(control: ControlView, units: UnitSystem, rooms: Rooms): string {
  const { value } = control
  if (control.kind === 'number')
    return [shownValue(Number(value), control.unit, units), unitWord(control.unit, units, Number(value))]
      .filter(Boolean)
      .join('\u00a0')
  if (control.kind === 'choice')
    return control.options.find((option) => option.value === value)?.words ?? String(value)
  if (control.kind === 'time') return String(value)
  const names = roomsIn(value).flatMap((code) => rooms.find((room) => room.id === code)?.name ?? [])
  return names.length === 0 ? control.noneWords : names.join(' or ')
}
