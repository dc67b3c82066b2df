import type { Metadata } from 'next'
import Link from 'next/link'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { SignOut } from '@/app/_components/layout/sign-out'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { database } from '@/app/_server/database'
import { requireUser } from '@/app/_server/session'
import { listSites } from '@/app/_server/sites'
import { roleWords } from '@/lib/sites/permissions'

export const dynamic = 'force-dynamic'
export const metadata: Metadata = { title: 'Your sites' }

export default async function SitesPage() {
  const user = await requireUser()
  const sites = await listSites(database(), user.id)
  return (
    <PublicShell narrow actions={<SignOut className="min-h-11" />}>
      <PageSentence>
        {sites.length === 0 ? (
          <>
            Welcome, {user.name}. <strong>Two rooms</strong> make a beginning: where boxes are kept, and where
            you turn.
          </>
        ) : sites.length === 1 ? (
          'You belong to one site.'
        ) : (
          `You belong to ${String(sites.length)} sites.`
        )}
      </PageSentence>
      {sites.length > 0 ? (
        <Sheet title="Your sites" id="sites">
          <ul className="flex flex-col divide-y divide-line">
            {sites.map((site) => (
              <li key={site.id}>
                <Link
                  href={`/sites/${site.id}`}
                  className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 py-2"
                >
                  <span className="font-semibold text-heart underline underline-offset-4">{site.name}</span>
                  <span className="text-ink-soft">
                    {roleWords[site.role].toLowerCase()}
                    {site.isDemo ? ', demo' : ''}
                  </span>
                </Link>
              </li>
            ))}
          </ul>
        </Sheet>
      ) : null}
      <div className="px-4 sm:px-0">
        <ButtonLink
          href="/sites/new"
          variant={sites.length === 0 ? 'filled' : 'second'}
          className="max-sm:w-full"
        >
          {sites.length === 0 ? 'Make your site' : 'Make another site'}
        </ButtonLink>
      </div>
    </PublicShell>
  )
}
