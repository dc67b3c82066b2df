'use client'

import { Cautions } from '@/app/_components/ui/caution'
import { DataTable } from '@/app/_components/ui/data-table'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { FieldWord, Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import {
  saltCautions,
  saltDoubt,
  saltFigure,
  saltItems,
  saltNames,
  saltsFields,
  saltsSentence,
} from './salts-model'

/** What wet salts hold in a sealed box at the temperature asked. */
export function SaltsBench() {
  const form = useFields<keyof typeof saltsFields>(saltsFields)
  const { shown, isOld } = useLastGood(form.texts.temperatureC, () =>
    form.values === undefined ? undefined : saltItems(form.values.temperatureC),
  )
  return (
    <>
      <BenchSentence above="Checking a sensor by a wet salt" isOld={isOld}>
        {shown === undefined ? (
          'Type the temperature of the box, and this says what a true sensor reads over each salt.'
        ) : (
          <RichText parts={saltsSentence(shown)} />
        )}
      </BenchSentence>
      <Sheet>
        <FlowingSentence>
          The sealed box stands at <FieldWord of={form} name="temperatureC" />.
        </FlowingSentence>
        <Refusals of={[form.refusals]} />
      </Sheet>
      {shown === undefined ? null : (
        <Sheet className={isOld ? 'opacity-60' : undefined}>
          <DataTable
            caption="What the air over each wet salt holds"
            rows={shown}
            rowKey={(item) => item.salt}
            columns={[
              { id: 'salt', header: 'Salt', phone: 'title', cell: (item) => saltNames[item.salt].name },
              { id: 'humidity', header: 'A true sensor reads', cell: saltFigure },
              { id: 'doubt', header: 'Doubt', phone: 'line', cell: saltDoubt },
              {
                id: 'note',
                header: 'Note',
                cell: (item) => <span className="text-ink-soft">{saltNames[item.salt].note}</span>,
              },
            ]}
          />
          <p className="mt-4 max-w-words text-label text-ink-soft">
            Stir the salt with a little clean water to a slush in which undissolved grains stay, put it in a
            small open cup in a box that seals, the sensor beside it and not touching, and wait half a day at
            one steady temperature. Two salts tell a sensor’s slope as well as its offset.
          </p>
        </Sheet>
      )}
      <div className="px-4 sm:px-0">
        <Cautions cautions={saltCautions} />
      </div>
      <BenchFoot
        method="salts"
        twins={form.values === undefined ? [] : [{ path: '/bench/salts', query: form.values }]}
      />
    </>
  )
}
