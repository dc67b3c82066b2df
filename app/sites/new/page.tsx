import type { Metadata } from 'next'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { TextLink } from '@/app/_components/ui/text-link'
import { requireUser } from '@/app/_server/session'
import { knownTimeZones } from '@/lib/sites/time-zones'
import { NewSiteForm } from '../_components/new-site-form'

export const dynamic = 'force-dynamic'
export const metadata: Metadata = { title: 'A new site' }

export default async function NewSitePage() {
  await requireUser()
  return (
    <PublicShell
      narrow
      actions={
        <TextLink href="/sites" className="inline-flex min-h-11 items-center">
          Your sites
        </TextLink>
      }
    >
      <NewSiteForm timeZones={knownTimeZones()} />
    </PublicShell>
  )
}
