import { type Action, may, type Role } from '@/lib/sites/permissions'
import type { SiteFrame } from '@/lib/sites/site'
import type { PageIconName } from '../ui/icons'

export type PageEntry = {
  icon: PageIconName
  word: string
  /** Below `/sites/{site}`; empty for Now. */
  path: string
  needs: Action
  count?: (counts: SiteFrame['counts']) => { words: string; isWarning: boolean } | null
  /** Stands in the phone's bottom bar; the rest is under "More". */
  isMain: boolean
}

const plain = (count: number) => ({ words: String(count), isWarning: false })

/** The pages of a site, in the order in which they stand in the side list. */
const pages: readonly PageEntry[] = [
  { icon: 'now', word: 'Now', path: '', needs: 'now:see', isMain: true },
  {
    icon: 'rooms',
    word: 'Rooms',
    path: '/rooms',
    needs: 'rooms:see',
    count: (counts) => plain(counts.rooms),
    isMain: true,
  },
  {
    icon: 'sensors',
    word: 'Sensors',
    path: '/sensors',
    needs: 'sensors:see',
    count: (counts) =>
      counts.sensorsSilent > 0
        ? { words: `${String(counts.sensorsSilent)} silent`, isWarning: true }
        : plain(counts.sensors),
    isMain: false,
  },
  {
    icon: 'pieces',
    word: 'Pieces',
    path: '/pieces',
    needs: 'pieces:see',
    count: (counts) => plain(counts.pieces),
    isMain: true,
  },
  { icon: 'carry', word: 'Carry', path: '/carry', needs: 'carries:see', isMain: true },
  {
    icon: 'notices',
    word: 'Notices',
    path: '/notices',
    needs: 'notices:see',
    count: (counts) =>
      counts.newNotices > 0 ? { words: `${String(counts.newNotices)} new`, isWarning: false } : null,
    isMain: false,
  },
  { icon: 'place', word: 'People and place', path: '/place', needs: 'site:see', isMain: false },
]

export const pagesFor = (role: Role): PageEntry[] => pages.filter((page) => may(role, page.needs))

/** The phone's bottom bar has an order of its own: what is reached for most stands by the thumb. */
const barOrder = ['Now', 'Carry', 'Pieces', 'Rooms']

export const barPagesFor = (role: Role): PageEntry[] =>
  barOrder.flatMap((word) => pagesFor(role).filter((page) => page.word === word))

/** Whether an address lies on a page or below it. */
export function isCurrent(page: PageEntry, base: string, pathname: string): boolean {
  const address = base + page.path
  return page.path === '' ? pathname === address : pathname === address || pathname.startsWith(`${address}/`)
}
