'use client'

import { useInfiniteQuery } from '@tanstack/react-query'
import { apiFetch } from '@/app/_components/api'
import { Age } from '@/app/_components/ui/age'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Pager } from '@/app/_components/ui/pager'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState, StaleState } from '@/app/_components/ui/states'
import type { DemoMail } from '@/lib/sites/demo'
import { MailText } from './mail-text'

type Page = { items: DemoMail[]; nextCursor: string | null }

/** Looked at every few seconds: a mail that was just sent is what one waits for here. */
const EVERY_MS = 3_000

export function DemoInbox({ initial, at }: { initial: Page; at: string }) {
  const mails = useInfiniteQuery({
    queryKey: ['demo-inbox'],
    queryFn: ({ pageParam, signal }) =>
      apiFetch<Page>(
        `/demo/inbox?limit=50${pageParam === null ? '' : `&cursor=${encodeURIComponent(pageParam)}`}`,
        {
          signal,
        },
      ),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.nextCursor,
    initialData: { pages: [initial], pageParams: [null] },
    refetchInterval: EVERY_MS,
  })
  const items = mails.data.pages.flatMap((page) => page.items)
  return (
    <>
      <PageSentence above="Demo inbox">
        {items.length === 0
          ? 'No mail has been sent yet.'
          : 'These mails went to nobody: the demo keeps them here instead of sending them.'}
      </PageSentence>
      {mails.isError ? (
        <StaleState>The inbox could not be fetched just now; these are the last known.</StaleState>
      ) : null}
      {items.length === 0 ? (
        <Sheet>
          <EmptyState title="Nothing here">
            Warnings about carries, links to confirm an address, for a new password and invitations arrive
            here.
          </EmptyState>
        </Sheet>
      ) : (
        <ul className="flex flex-col gap-4">
          {items.map((mail) => (
            <li key={mail.id}>
              <article
                aria-label={mail.subject}
                className="border-y border-line bg-board px-4 py-4 sm:rounded sm:border sm:px-6"
              >
                <h2 className="text-title font-semibold">{mail.subject}</h2>
                <p className="text-label break-all text-ink-soft">
                  to {mail.to.join(', ')}, <Age at={mail.at} timeZone="UTC" now={at} />
                </p>
                <MailText text={mail.text} />
              </article>
            </li>
          ))}
        </ul>
      )}
      {items.length > 0 ? (
        <div className="px-4 sm:px-0">
          <Pager
            shown={items.length}
            hasMore={mails.hasNextPage}
            onMore={() => void mails.fetchNextPage()}
            pending={mails.isFetchingNextPage}
            noun="mails"
          />
        </div>
      ) : null}
    </>
  )
}
