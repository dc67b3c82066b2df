'use client'

import Link from 'next/link'
import type { ReactNode } from 'react'
import { formatClock, formatDay } from '@/lib/format/times'
import { roleWords } from '@/lib/sites/permissions'
import type { SiteFrame } from '@/lib/sites/site'
import { Live } from '../live/live'
import { useSiteQuery } from '../live/use-site-query'
import { Logo } from '../ui/icons'
import { useNow } from '../ui/use-now'
import { BottomBar } from './bottom-bar'
import { DemoBanner } from './demo-banner'
import { PageList } from './page-list'
import { pagesFor } from './pages'
import { PhoneHeader } from './phone-header'
import { SkipLink } from './public-shell'
import { SignOut } from './sign-out'
import { SiteProvider } from './site-context'
import { SiteSwitcher } from './site-switcher'
import { ThemeChoice } from './theme-choice'

/** The frame round every page of a site: where one is, what waits where, who is signed in. */
export function SiteShell({ frame: initial, children }: { frame: SiteFrame; children: ReactNode }) {
  const { data } = useSiteQuery<SiteFrame>({ site: initial.site.id, area: 'frame', path: '/frame', initial })
  const frame = data ?? initial
  const { site } = frame
  const base = `/sites/${site.id}`

  return (
    <SiteProvider
      value={{
        site: site.id,
        siteName: site.name,
        timeZone: site.timeZone,
        units: frame.unitSystem,
        role: site.role,
        isDemo: site.isDemo,
      }}
    >
      <SkipLink />
      <Live site={site.id} />
      {site.isDemo ? <DemoBanner site={site} /> : null}
      <div className="lg:grid lg:min-h-dvh lg:grid-cols-[240px_minmax(0,1fr)]">
        <header className="border-r border-line max-lg:hidden">
          <div className="sticky top-0 flex max-h-dvh flex-col overflow-y-auto py-5">
            <Link href={base} className="flex min-h-11 items-center gap-3 px-6 text-[21px] font-semibold">
              <Logo />
              Lidfast
            </Link>
            <div className="mx-4 my-3 border-y border-line">
              <SiteSwitcher site={site} sites={frame.sites} />
            </div>
            <nav aria-label="Pages" className="mt-1">
              <PageList base={base} pages={pagesFor(site.role)} counts={frame.counts} />
            </nav>
            <div className="px-6 pt-8 pb-4">
              <FrameFoot frame={frame} />
            </div>
          </div>
        </header>
        <div className="min-w-0">
          <PhoneHeader base={base} frame={frame} />
          <main
            id="main"
            tabIndex={-1}
            className="mx-auto flex max-w-[1200px] flex-col gap-7 pt-5 pb-32 outline-none sm:px-6 lg:px-10 lg:pt-8 lg:pb-16"
          >
            {children}
          </main>
        </div>
      </div>
      <BottomBar base={base} frame={frame}>
        <div className="mb-3 border-y border-line">
          <SiteSwitcher site={site} sites={frame.sites} />
        </div>
        <FrameFoot frame={frame} />
      </BottomBar>
    </SiteProvider>
  )
}

function FrameFoot({ frame }: { frame: SiteFrame }) {
  const now = useNow(frame.at)
  const { timeZone, role } = frame.site
  const { sensors, sensorsHeard } = frame.counts
  return (
    <div className="flex flex-col items-start gap-4 text-label text-ink-soft">
      <p>
        <strong className="block text-ink">
          {formatDay(now, timeZone, now)}, {formatClock(now, timeZone)}
        </strong>
        {sensors > 0 ? `${String(sensorsHeard)} of ${String(sensors)} sensors heard` : 'No sensors yet'}
      </p>
      <p>
        Signed in as {frame.user.name}, {roleWords[role].toLowerCase()} here
        <br />
        <SignOut className="min-h-11" />
      </p>
      <ThemeChoice />
    </div>
  )
}
