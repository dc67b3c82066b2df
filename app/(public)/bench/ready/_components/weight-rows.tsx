'use client'

import { Button } from '@/app/_components/ui/button'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { fieldValue } from '@/lib/bench/fields'
import { NumberWord } from '../../_components/field-word'
import { useUnits } from '../../_components/use-units'
import { gramsField, MOST_WEIGHTS } from './weighings'

type WeightRowsProps = {
  grams: readonly string[]
  /** Undefined where they are an equal time apart. */
  on: readonly string[] | undefined
  onChange: (grams: readonly string[], on: readonly string[] | undefined) => void
}

/** The weighings, first to last; each may have its day. */
export function WeightRows({ grams, on, onChange }: WeightRowsProps) {
  const [units] = useUnits()
  const replaced = (list: readonly string[], index: number, text: string) =>
    list.map((before, other) => (other === index ? text : before))
  return (
    <div className="mt-2">
      <ol className="grid gap-x-6 gap-y-2 sm:grid-cols-2 lg:grid-cols-3">
        {grams.map((text, index) => (
          <li key={index} className="flex flex-wrap items-center gap-x-2 gap-y-1">
            <span className="w-6 text-right text-ink-soft">{index + 1}</span>
            {on === undefined ? null : (
              <SentenceInput
                type="date"
                label={`Day ${String(index + 1)}`}
                value={on[index] ?? ''}
                onChange={(event) => {
                  onChange(grams, replaced(on, index, event.target.value))
                }}
              />
            )}
            <NumberWord
              label={gramsField(index + 1).label}
              kind="mass"
              text={text}
              isRefused={!fieldValue(gramsField(index + 1), text, units).ok}
              onText={(typed) => {
                onChange(replaced(grams, index, typed), on)
              }}
            />
          </li>
        ))}
      </ol>
      <div className="mt-3 flex flex-wrap gap-3">
        <Button
          notYet={grams.length < MOST_WEIGHTS ? undefined : `${String(MOST_WEIGHTS)} weights at most`}
          onClick={() => {
            onChange([...grams, grams.at(-1) ?? ''], on === undefined ? undefined : [...on, ''])
          }}
        >
          Add a weight
        </Button>
        {grams.length > 1 ? (
          <Button
            variant="quiet"
            onClick={() => {
              onChange(grams.slice(0, -1), on?.slice(0, -1))
            }}
          >
            Take the last one away
          </Button>
        ) : null}
      </div>
    </div>
  )
}
