'use client'

import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import type { PieceFilters as Filters } from '@/lib/pieces/list-address'
import { stageSchema } from '@/lib/pieces/piece'
import { stageWords } from '@/lib/pieces/wording'

type PieceFiltersProps = {
  filters: Filters
  onChange: (change: Partial<Omit<Filters, 'sort'>> & { sort?: string }) => void
  rooms: readonly { id: string; name: string }[]
}

const sorts = [
  { value: 'number', label: 'by number' },
  { value: '-number', label: 'by number, highest first' },
  { value: 'wood', label: 'by wood' },
  { value: '-wood', label: 'by wood, backwards' },
  { value: 'room', label: 'by room' },
  { value: '-room', label: 'by room, backwards' },
  { value: '-created', label: 'newest first' },
  { value: 'created', label: 'oldest first' },
]

export function PieceFilters({ filters, onChange, rooms }: PieceFiltersProps) {
  return (
    <form
      role="search"
      aria-label="Find a piece"
      className="grid grid-cols-2 gap-3 md:grid-cols-5"
      onSubmit={(event) => {
        event.preventDefault()
      }}
    >
      <Field label="Number, wood or note" className="max-md:col-span-2">
        <Input
          type="search"
          maxLength={60}
          value={filters.q}
          onChange={(event) => {
            onChange({ q: event.target.value })
          }}
        />
      </Field>
      <Field label="What it is">
        <Select
          value={filters.stage ?? ''}
          onChange={(event) => {
            const parsed = stageSchema.safeParse(event.target.value)
            onChange({ stage: parsed.success ? parsed.data : null })
          }}
        >
          <option value="">Everything</option>
          {stageSchema.options.map((option) => (
            <option key={option} value={option}>
              {stageWords[option]}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Room">
        <Select
          value={filters.room ?? ''}
          onChange={(event) => {
            onChange({ room: event.target.value || null })
          }}
        >
          <option value="">All rooms</option>
          {rooms.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Out or in">
        <Select
          value={filters.out ?? ''}
          onChange={(event) => {
            const { value } = event.target
            onChange({ out: value === 'yes' || value === 'no' ? value : null })
          }}
        >
          <option value="">Either</option>
          <option value="yes">Out</option>
          <option value="no">Not logged out</option>
        </Select>
      </Field>
      <Field label="Order">
        <Select
          value={filters.sort}
          onChange={(event) => {
            onChange({ sort: event.target.value })
          }}
        >
          {sorts.map((sort) => (
            <option key={sort.value} value={sort.value}>
              {sort.label}
            </option>
          ))}
        </Select>
      </Field>
    </form>
  )
}
