'use client'

import Link from 'next/link'
import { usePathname } from 'next/navigation'
import { type ReactNode, useState } from 'react'
import type { SiteFrame } from '@/lib/sites/site'
import { classNames } from '../ui/class-names'
import { Dialog } from '../ui/dialog'
import { PageIcon } from '../ui/icons'
import { PageList } from './page-list'
import { barPagesFor, isCurrent, pagesFor } from './pages'

type BottomBarProps = { base: string; frame: SiteFrame; children: ReactNode }

const cell = 'relative flex min-h-14 flex-1 flex-col items-center justify-center gap-0.5 text-small'
const hereCell =
  'font-semibold text-heart before:absolute before:inset-x-3 before:top-0 before:h-[3px] before:bg-heart'

/** The phone's main pages by the thumb; the others, and the site's own matters, under "More". */
export function BottomBar({ base, frame, children }: BottomBarProps) {
  const pathname = usePathname()
  const [open, setOpen] = useState(false)
  const bar = barPagesFor(frame.site.role)
  const others = pagesFor(frame.site.role).filter((page) => !page.isMain)
  const onOther = others.some((page) => isCurrent(page, base, pathname))
  const { sensorsSilent } = frame.counts

  return (
    <nav
      aria-label="Pages"
      className="fixed inset-x-0 bottom-0 z-30 flex border-t border-edge bg-board pb-[env(safe-area-inset-bottom)] lg:hidden"
    >
      {bar.map((page) => {
        const here = isCurrent(page, base, pathname)
        return (
          <Link
            key={page.path}
            href={base + page.path}
            aria-current={here ? 'page' : undefined}
            className={classNames(cell, here && hereCell)}
          >
            <PageIcon name={page.icon} />
            {page.word}
          </Link>
        )
      })}
      <button
        type="button"
        aria-haspopup="dialog"
        onClick={() => {
          setOpen(true)
        }}
        className={classNames(cell, onOther && hereCell)}
      >
        <PageIcon name="more" />
        More
        {sensorsSilent > 0 ? <span className="sr-only">, {sensorsSilent} sensors silent</span> : null}
      </button>
      <Dialog open={open} onOpenChange={setOpen} title={frame.site.name}>
        <div className="-mx-6 max-sm:-mx-4">
          <PageList
            base={base}
            pages={others}
            counts={frame.counts}
            onFollow={() => {
              setOpen(false)
            }}
          />
        </div>
        <div className="mt-4 border-t border-line pt-4">{children}</div>
      </Dialog>
    </nav>
  )
}
