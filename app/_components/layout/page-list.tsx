'use client'

import Link from 'next/link'
import { usePathname } from 'next/navigation'
import type { SiteFrame } from '@/lib/sites/site'
import { classNames } from '../ui/class-names'
import { PageIcon } from '../ui/icons'
import { isCurrent, type PageEntry } from './pages'

type PageListProps = {
  base: string
  pages: readonly PageEntry[]
  counts: SiteFrame['counts']
  onFollow?: () => void
}

/** The pages of a site with their counts: the side list of a desk, and what "More" opens on a phone. */
export function PageList({ base, pages, counts, onFollow }: PageListProps) {
  const pathname = usePathname()
  return (
    <ul>
      {pages.map((page) => {
        const here = isCurrent(page, base, pathname)
        const count = page.count?.(counts) ?? null
        return (
          <li key={page.path}>
            <Link
              href={base + page.path}
              aria-current={here ? 'page' : undefined}
              onClick={onFollow}
              className={classNames(
                'relative flex min-h-11 items-center gap-3 px-6 hover:text-heart',
                here &&
                  'font-semibold text-heart before:absolute before:inset-y-2 before:left-0 before:w-1 before:bg-heart',
              )}
            >
              <PageIcon name={page.icon} />
              <span className="grow">{page.word}</span>
              {count ? (
                <span
                  className={classNames(
                    'text-label',
                    count.isWarning ? 'font-semibold text-warn' : 'text-ink-soft',
                  )}
                >
                  {count.words}
                </span>
              ) : null}
            </Link>
          </li>
        )
      })}
    </ul>
  )
}
