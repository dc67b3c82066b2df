'use client'

import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { Wood } from '@/lib/wood/wood'
import { woodAreas } from './put-wood-away'

/** Own woods that are offered no more. */
export function AwayWoods({ site, woods }: { site: string; woods: readonly Wood[] }) {
  if (woods.length === 0) return null
  return (
    <Sheet title="Put away" id="away" aside="Not offered for new pieces">
      <ul className="flex flex-col divide-y divide-line">
        {woods.map((wood) => (
          <AwayWood key={wood.slug} site={site} wood={wood} />
        ))}
      </ul>
    </Sheet>
  )
}

function AwayWood({ site, wood }: { site: string; wood: Wood }) {
  const bringOut = useAction<Record<string, never>, Wood>({
    run: () => apiFetch(`/sites/${site}/species/${wood.slug}/restore`, { method: 'POST' }),
    invalidates: woodAreas(site),
    done: `${wood.commonName} is among the woods again`,
  })
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 py-3">
      <span>
        {wood.commonName} <span className="text-ink-soft italic">{wood.latinName}</span>
      </span>
      <Button
        pending={bringOut.pending}
        onClick={() => {
          bringOut.act({})
        }}
      >
        Bring it out again <span className="sr-only">: {wood.commonName}</span>
      </Button>
    </li>
  )
}
