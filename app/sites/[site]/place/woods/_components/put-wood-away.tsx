'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { useAction } from '@/app/_components/use-action'
import type { Wood } from '@/lib/wood/wood'

/** What else shows a wood's figures, or verdicts that rest on them. */
export const woodAreas = (site: string) => [
  siteKey(site, 'woods'),
  siteKey(site, 'pieces'),
  siteKey(site, 'carries'),
  siteKey(site, 'now'),
]

type PutWoodAwayProps = { site: string; wood: Wood; onPutAway: (wood: Wood) => void }

/** Puts an own wood away, or has the table's figures count again. It asks nothing first, as it can be undone. */
export function PutWoodAway({ site, wood, onPutAway }: PutWoodAwayProps) {
  const putAway = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`/sites/${site}/species/${wood.slug}`, { method: 'DELETE', ifMatch: wood.version }),
    invalidates: woodAreas(site),
    onDone: () => {
      onPutAway(wood)
    },
  })
  return (
    <Button
      variant="link"
      pending={putAway.pending}
      onClick={() => {
        putAway.act({})
      }}
    >
      {wood.isOwn ? 'Put away' : 'Go by the table again'} <span className="sr-only">: {wood.commonName}</span>
    </Button>
  )
}
