'use client'

import { classNames } from '@/app/_components/ui/class-names'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { type Cover, coverSchema, coverWords } from '@/lib/pieces/piece'
import type { LidRoom } from '@/lib/pieces/piece-fit'
import { stays, stayWords } from '../../../_components/stays'
import { type LidChoice, type LidPreset, sameChoice } from './lid-choice'

type LidChoicesProps = {
  presets: readonly LidPreset[]
  /** Those with a fresh reading. */
  rooms: readonly LidRoom[]
  choice: LidChoice
  onChoose: (choice: LidChoice) => void
}

const GIVEN_TIME = 'given-time'
/** An evening to the next morning is asked for more often than half a day. */
const stayMinutes = [...stays, 840].toSorted((one, other) => one - other)

/** Where and for how long the lid is seen: a few usual questions, and a sentence for any other. */
export function LidChoices({ presets, rooms, choice, onChoose }: LidChoicesProps) {
  const there = choice.kind === 'there' ? choice : undefined
  const [first] = rooms
  const start = presets.find((preset) => preset.choice.kind === 'there')?.choice
  const base = there ?? (start?.kind === 'there' ? start : undefined)
  return (
    <div className="flex flex-col gap-2">
      <div role="group" aria-label="Where the lid is seen" className="grid grid-cols-2 gap-2 lg:grid-cols-4">
        {presets.map((preset) => {
          const isChosen = sameChoice(preset.choice, choice)
          return (
            <button
              key={preset.key}
              type="button"
              aria-pressed={isChosen}
              onClick={() => {
                onChoose(preset.choice)
              }}
              className={classNames(
                'min-h-11 rounded border px-3 py-2',
                isChosen
                  ? 'border-ink bg-ink font-semibold text-board'
                  : 'border-edge bg-board hover:border-ink',
              )}
            >
              {preset.label}
            </button>
          )
        })}
      </div>
      {base === undefined || first === undefined ? null : (
        <FlowingSentence>
          Or in{' '}
          <SentenceSelect
            label="Room"
            value={base.roomId}
            onChange={(event) => {
              onChoose({ ...base, roomId: event.target.value })
            }}
          >
            {rooms.map((room) => (
              <option key={room.id} value={room.id}>
                {room.name}
              </option>
            ))}
          </SentenceSelect>{' '}
          <SentenceSelect
            label="How long"
            value={base.stayMinutes === null ? GIVEN_TIME : String(base.stayMinutes)}
            onChange={(event) => {
              const { value } = event.target
              onChoose({ ...base, stayMinutes: value === GIVEN_TIME ? null : Number(value) })
            }}
          >
            {stayMinutes.map((minutes) => (
              <option key={minutes} value={minutes}>
                for {stayWords(minutes)}
              </option>
            ))}
            <option value={GIVEN_TIME}>given time</option>
          </SentenceSelect>
          {base.stayMinutes === null ? (
            '.'
          ) : (
            <>
              ,{' '}
              <SentenceSelect
                label="Cover"
                value={base.cover}
                onChange={(event) => {
                  onChoose({ ...base, cover: coverOf(event.target.value) })
                }}
              >
                {coverSchema.options.map((cover) => (
                  <option key={cover} value={cover}>
                    {coverWords[cover]}
                  </option>
                ))}
              </SentenceSelect>
              .
            </>
          )}
        </FlowingSentence>
      )}
    </div>
  )
}

const coverOf = (value: string): Cover => coverSchema.catch('open').parse(value)
