'use client'

import { Callout } from '@/app/_components/ui/callout'
import { Sheet } from '@/app/_components/ui/sheet'
import { useNow } from '@/app/_components/ui/use-now'
import type { PieceDetail } from '@/lib/pieces/piece'
import type { RestView, WeighingsPage } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { ReadySwitch } from './ready-switch'
import { RestingCurve } from './resting-curve'
import { StillMissing } from './still-missing'
import { useWeighings } from './use-weighings'
import { WeighIt } from './weigh-it'
import { WeighingList } from './weighing-list'

type RestingSheetsProps = { reader: Reader; piece: PieceDetail; initial: WeighingsPage | null }

/** Whether a blank or a roughed piece is ready, why not, and what it weighed. Of a box only its weights, folded. */
export function RestingSheets({ reader, piece, initial }: RestingSheetsProps) {
  const { data } = useWeighings(reader, piece.id, initial)
  // A minute is exact enough for days.
  const now = useNow(reader.at, 60_000)
  if (data === undefined) return null
  const { rest } = data
  const list = <WeighingList reader={reader} pieceId={piece.id} page={data} now={now} />
  if (piece.stage === 'box')
    return (
      <Sheet id="weights">
        <details>
          <summary className="min-h-11 cursor-pointer py-2 text-title font-semibold">What it weighed</summary>
          <div className="mt-3 flex flex-col gap-4">
            {rest === null || rest.weighings.at.length === 0 ? null : (
              <RestingCurve rest={rest} reader={reader} now={now} />
            )}
            {list}
            {piece.isArchived === true ? null : (
              <div>
                <WeighIt reader={reader} piece={piece} initial={initial} />
              </div>
            )}
          </div>
        </details>
      </Sheet>
    )
  if (rest === null) return null
  return (
    <>
      <Sheet title="Resting" id="resting" ticks>
        <div className="flex flex-col gap-5">
          <RestSentence rest={rest} />
          <RestingCurve rest={rest} reader={reader} now={now} />
        </div>
      </Sheet>
      <div className="grid gap-7 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <Sheet title="Weighings" id="weights" aside={rest.nextWeighing.isDue ? 'next due now' : undefined}>
          {list}
        </Sheet>
        <Sheet title={rest.state === 'not-ready' ? 'What is still missing' : 'Why it is ready'} id="missing">
          <StillMissing rest={rest} units={reader.units} />
          <ReadySwitch reader={reader} piece={piece} />
        </Sheet>
      </div>
    </>
  )
}

function RestSentence({ rest }: { rest: RestView }) {
  const isReady = rest.state !== 'not-ready'
  return (
    <Callout
      tone={isReady ? 'good' : 'ink'}
      mark={isReady ? 'fine' : rest.nextWeighing.isDue ? 'weigh' : 'keep-short'}
      title={rest.words}
    >
      <p>{rest.next}</p>
    </Callout>
  )
}
