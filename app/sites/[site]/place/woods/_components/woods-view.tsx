'use client'

import { parseAsString, useQueryState } from 'nuqs'
import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Caution } from '@/app/_components/ui/caution'
import { PageActions } from '@/app/_components/ui/page-actions'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { StaleState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { DUST_ALWAYS } from '@/lib/wood/dust'
import { PROTECTED_ASK } from '@/lib/wood/protected'
import type { Wood } from '@/lib/wood/wood'
import { woodsSentence } from '@/lib/wood/wood-words'
import { AwayWoods } from './away-woods'
import { PutAwayLine } from './put-away-line'
import { WoodList } from './wood-list'

type WoodsViewProps = { reader: Reader; woods: readonly Wood[]; away: readonly Wood[] }
type List = { items: readonly Wood[] }

/** All woods with what is known of them and how well, the site's own first. */
export function WoodsView({ reader, woods: initial, away: initialAway }: WoodsViewProps) {
  const [query, setQuery] = useQueryState(
    'q',
    parseAsString.withDefault('').withOptions({ history: 'replace' }),
  )
  const [gone, setGone] = useState<Wood | null>(null)
  // All of them at once: a search in what is here answers with each letter, and the table is short.
  const list = useSiteQuery<List>({
    site: reader.site,
    area: 'woods',
    key: ['list'],
    path: '/species?limit=200',
    initial: { items: initial },
  })
  const away = useSiteQuery<List>({
    site: reader.site,
    area: 'woods',
    key: ['away'],
    path: '/species?away=yes&limit=200',
    initial: { items: initialAway },
  })
  const woods = list.data?.items ?? initial
  const base = `/sites/${reader.site}/place`
  const mayChange = may(reader.role, 'woods:change')

  return (
    <>
      <PageSentence above={<TextLink href={base}>People and place</TextLink>}>
        {woodsSentence(woods)}
      </PageSentence>
      {list.isError ? (
        <StaleState>
          The woods could not be fetched just now. Nothing is lost; these are the last known.
        </StaleState>
      ) : null}
      {mayChange ? (
        <PageActions>
          <ButtonLink href={`${base}/woods/new`} variant="filled">
            Add a wood of your own
          </ButtonLink>
        </PageActions>
      ) : null}
      {gone ? (
        <PutAwayLine
          key={gone.slug}
          site={reader.site}
          wood={gone}
          onGone={() => {
            setGone(null)
          }}
        />
      ) : null}
      <WoodList
        reader={reader}
        woods={woods}
        query={query}
        onQuery={(q) => void setQuery(q === '' ? null : q)}
        onPutAway={mayChange ? setGone : undefined}
      />
      {mayChange ? <AwayWoods site={reader.site} woods={away.data?.items ?? initialAway} /> : null}
      <div className="flex flex-col gap-2 max-sm:px-4">
        <Caution>{DUST_ALWAYS} Not medical advice. Guidance on wood dust: HSE, OSHA.</Caution>
        <Caution>Woods under protection are marked from memory. {PROTECTED_ASK}</Caution>
      </div>
    </>
  )
}
