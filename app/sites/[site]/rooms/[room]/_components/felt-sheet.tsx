'use client'

import { describeError } from '@/app/_components/api'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { ErrorState } from '@/app/_components/ui/states'
import type { RoomFelt } from '@/lib/rooms/felt'
import { feltDoubtWords, feltGapWords, feltSentence } from '@/lib/rooms/felt-words'
import type { Reader } from '@/lib/sites/reader'
import type { FindableWood } from '@/lib/wood/find-woods'
import { formatDensity } from '@/lib/wood/wood-words'
import { FeltChart } from './felt-chart'
import { FeltControls } from './felt-controls'
import type { useFelt } from './use-felt'

type FeltSheetProps = {
  reader: Reader
  felt: ReturnType<typeof useFelt>
  woods: readonly FindableWood[]
  now: Date
}

/** What wood has felt of this room so far, for any wood and thickness, with its doubt and what that rests on. */
export function FeltSheet({ reader, felt: { query, asked, setWood, setOwnMm }, woods, now }: FeltSheetProps) {
  return (
    <Sheet id="felt" title="What wood has felt here" aside="Felt: what it has followed so far of the air">
      <FeltControls
        woods={woods}
        asked={asked}
        units={reader.units}
        onWood={setWood}
        onThickness={setOwnMm}
      />
      <div className="mt-4" aria-busy={query.isPlaceholderData || undefined}>
        {query.data ? (
          <Felt felt={query.data} ownMm={asked.ownMm} reader={reader} now={now} />
        ) : query.isError ? null : (
          <p role="status" className="text-ink-soft">
            Following the wood through the readings.
          </p>
        )}
      </div>
      {query.isError ? (
        <div className="mt-4">
          <ErrorState
            title={describeError(query.error).title}
            pending={query.isFetching}
            onRetry={() => {
              void query.refetch()
            }}
          >
            {describeError(query.error).detail}
          </ErrorState>
        </div>
      ) : null}
    </Sheet>
  )
}

type FeltProps = { felt: RoomFelt; ownMm: number | null; reader: Reader; now: Date }

function Felt({ felt, ownMm, reader, now }: FeltProps) {
  if (felt.felt.length === 0) {
    return (
      <p className="max-w-words text-ink-soft">
        Nothing yet: with the first hours of readings wood begins to feel this room.
      </p>
    )
  }
  const { timeZone, units, role } = reader
  return (
    <>
      <p className="max-w-words text-[18px] leading-7 sm:text-[19px]" role="status">
        <RichText parts={feltSentence(felt, units)} />
      </p>
      <p className="mt-2 max-w-words">
        {feltDoubtWords(felt, units)}{' '}
        <span className="text-ink-soft">
          Bare wood of {felt.wood.isDensityAssumed ? 'about ' : ''}
          {formatDensity(felt.wood.densityKgM3)}, open on both faces; how quickly it follows is good to a
          factor of two, which is in the doubt.
        </span>
      </p>
      {feltGapWords(felt, { timeZone, units, role, now }).map((words) => (
        <p key={words} className="mt-2 max-w-words">
          {words}
        </p>
      ))}
      <div className="mt-5">
        <FeltChart felt={felt} ownMm={ownMm} reader={reader} now={now} />
      </div>
    </>
  )
}
