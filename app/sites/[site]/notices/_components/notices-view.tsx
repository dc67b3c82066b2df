'use client'

import { useInfiniteQuery } from '@tanstack/react-query'
import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Pager } from '@/app/_components/ui/pager'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState, StaleState } from '@/app/_components/ui/states'
import { useAction } from '@/app/_components/use-action'
import type { Notice } from '@/lib/notices/notice'
import { isFresh, noticesHeadline } from '@/lib/notices/rule-sentences'
import type { Hearing } from '@/lib/notices/own-settings'
import type { Reader } from '@/lib/sites/reader'
import type { Site } from '@/lib/sites/site'
import { HearingSheet } from './hearing-sheet'
import { NoticeLine } from './notice-line'
import { QuietHours } from './quiet-hours'
import { WhatIsTold } from './what-is-told'

type NoticePage = { items: Notice[]; nextCursor: string | null }
type NoticesViewProps = {
  reader: Reader
  site: Site
  initial: NoticePage
  initialShow: 'all' | 'unseen'
  hearing: Hearing
  timeZones: readonly string[]
}

const shows = ['all', 'unseen'] as const
const perPage = 30

export function NoticesView({ reader, site, initial, initialShow, hearing, timeZones }: NoticesViewProps) {
  const [show, setShow] = useQueryState('show', parseAsStringLiteral(shows).withDefault('all'))
  const notices = useInfiniteQuery({
    queryKey: siteKey(reader.site, 'notices', 'list', show),
    queryFn: ({ pageParam, signal }) => {
      const unseen = show === 'unseen' ? '&unseen=yes' : ''
      const cursor = pageParam === null ? '' : `&cursor=${encodeURIComponent(pageParam)}`
      return apiFetch<NoticePage>(
        `/sites/${reader.site}/notices?limit=${String(perPage)}${unseen}${cursor}`,
        { signal },
      )
    },
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.nextCursor,
    initialData: show === initialShow ? { pages: [initial], pageParams: [null] } : undefined,
  })
  const seeAll = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`/sites/${reader.site}/notices/seen`, { method: 'POST' }),
    invalidates: [siteKey(reader.site, 'notices'), siteKey(reader.site, 'frame')],
  })
  const items = notices.data?.pages.flatMap((page) => page.items) ?? []
  const hasFresh = items.some(isFresh)

  return (
    <>
      <PageSentence parts={noticesHeadline(items, notices.hasNextPage)} />
      <Sheet
        title="What you were told"
        id="told"
        action={
          hasFresh ? (
            <Button
              variant="link"
              pending={seeAll.pending}
              onClick={() => {
                seeAll.act({})
              }}
            >
              Mark all as seen
            </Button>
          ) : null
        }
      >
        <SegmentedTabs
          label="Which notices to show"
          value={show}
          onValueChange={(value) => void setShow(value === 'unseen' ? 'unseen' : 'all')}
          segments={[
            { value: 'all', label: 'All' },
            { value: 'unseen', label: 'Not seen' },
          ]}
        >
          {notices.isError ? (
            <div className="mt-4">
              <StaleState>The notices could not be fetched just now; these are the last known.</StaleState>
            </div>
          ) : null}
          <ul className="mt-2 flex flex-col divide-y divide-line">
            {items.map((notice) => (
              <NoticeLine key={notice.id} reader={reader} notice={notice} />
            ))}
          </ul>
          {items.length === 0 ? (
            <div className="mt-4">
              {notices.isPending ? (
                <p className="text-ink-soft">Fetching the notices.</p>
              ) : (
                <EmptyState title={show === 'unseen' ? 'Nothing that you haven’t seen' : 'Nothing yet'}>
                  Warnings before a carry, pieces that must come in, lock-up and silent sensors stand here.
                </EmptyState>
              )}
            </div>
          ) : (
            <Pager
              shown={items.length}
              hasMore={notices.hasNextPage}
              onMore={() => void notices.fetchNextPage()}
              pending={notices.isFetchingNextPage}
              noun={items.length === 1 ? 'notice' : 'notices'}
            />
          )}
        </SegmentedTabs>
      </Sheet>
      <WhatIsTold reader={reader} />
      <HearingSheet reader={reader} initial={hearing} timeZones={timeZones} />
      <QuietHours key={site.version} reader={reader} site={site} />
    </>
  )
}
