'use client'

import Link from 'next/link'
import { usePathname } from 'next/navigation'
import { may } from '@/lib/sites/permissions'
import type { SiteFrame } from '@/lib/sites/site'
import { Logo, PageIcon } from '../ui/icons'
import { isCurrent, pagesFor } from './pages'

/** Where one is, and the bell with its count. */
export function PhoneHeader({ base, frame }: { base: string; frame: SiteFrame }) {
  const pathname = usePathname()
  const page = pagesFor(frame.site.role).find((entry) => isCurrent(entry, base, pathname))
  const title = page === undefined || page.path === '' ? frame.site.name : page.word
  const { newNotices } = frame.counts
  return (
    <header className="flex min-h-14 items-center justify-between gap-3 border-b border-line px-4 lg:hidden">
      <Link
        href={base}
        aria-label={`${frame.site.name}: Now`}
        className="flex min-h-11 min-w-0 items-center gap-3"
      >
        <Logo size={24} />
        <span className="truncate font-semibold">{title}</span>
      </Link>
      {may(frame.site.role, 'notices:see') ? (
        <Link
          href={`${base}/notices`}
          aria-label={`Notices, ${String(newNotices)} new`}
          className="flex min-h-11 min-w-11 items-center justify-end gap-2"
        >
          <PageIcon name="notices" />
          {newNotices > 0 ? <span className="font-semibold">{newNotices}</span> : null}
        </Link>
      ) : null}
    </header>
  )
}
