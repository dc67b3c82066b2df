'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import type { Forgotten } from '@/lib/carry/forgotten'
import type { Reader } from '@/lib/sites/reader'

type ForgottenPanelProps = { reader: Reader; carryId: string; isOpenAtFirst?: boolean }

/** "I forgot it": how bad it is, what to do tonight, and when to try the quarter turn. */
export function ForgottenPanel({ reader, carryId, isOpenAtFirst = false }: ForgottenPanelProps) {
  const [isOpen, setIsOpen] = useState(isOpenAtFirst)
  const { data, isError } = useSiteQuery<{ items: Forgotten[] }>({
    site: reader.site,
    area: 'carries',
    key: ['forgotten', carryId],
    path: `/carries/${carryId}/forgotten`,
    enabled: isOpen,
  })
  return (
    <Sheet
      id="forgotten"
      title="I forgot it"
      action={
        isOpen ? undefined : (
          <Button
            onClick={() => {
              setIsOpen(true)
            }}
          >
            How bad is it?
          </Button>
        )
      }
    >
      {isOpen ? (
        <div aria-live="polite">
          {data === undefined ? (
            <p>{isError ? 'It could not be worked out just now.' : 'Working it out.'}</p>
          ) : null}
          {data?.items.map((item) => (
            <ForgottenPiece key={item.pieceId} item={item} isAlone={data.items.length === 1} />
          ))}
        </div>
      ) : (
        <p className="max-w-words text-ink-soft">
          It happens. What it has lost, what to do tonight, and when to try the lid.
        </p>
      )}
    </Sheet>
  )
}

function ForgottenPiece({ item, isAlone }: { item: Forgotten; isAlone: boolean }) {
  return (
    <section className="border-b border-line py-4 first:pt-0 last:border-b-0 last:pb-0">
      {isAlone ? null : <h3 className="mb-2 font-semibold">{item.number}</h3>}
      <p className="max-w-words">{item.howBad}</p>
      <h4 className="mt-4 font-semibold">Tonight</h4>
      <ul className="mt-1 flex max-w-words list-disc flex-col gap-1 pl-5">
        {item.tonight.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <h4 className="mt-4 font-semibold">The quarter turn</h4>
      <p className="mt-1 max-w-words">{item.tryIt}</p>
    </section>
  )
}
