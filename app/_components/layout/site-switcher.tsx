'use client'

import { ChevronsUpDown } from 'lucide-react'
import Link from 'next/link'
import { DropdownMenu } from 'radix-ui'
import type { SiteFrame } from '@/lib/sites/site'

const itemClassName =
  'flex min-h-11 items-center px-4 outline-none data-[highlighted]:bg-wash data-[highlighted]:text-heart'

export function SiteSwitcher({ site, sites }: Pick<SiteFrame, 'site' | 'sites'>) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger
        aria-label={`${site.name}: change the place`}
        className="flex min-h-11 w-full items-center justify-between gap-2 px-2 text-left font-semibold"
      >
        <span className="truncate">{site.name}</span>
        <ChevronsUpDown aria-hidden="true" size={18} strokeWidth={1.5} className="shrink-0" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="start"
          sideOffset={4}
          className="z-40 min-w-52 rounded border border-edge bg-board py-1 shadow-menu"
        >
          {sites.map((other) => (
            <DropdownMenu.Item key={other.id} asChild>
              <Link
                href={`/sites/${other.id}`}
                aria-current={other.id === site.id ? 'true' : undefined}
                className={`${itemClassName} ${other.id === site.id ? 'font-semibold' : ''}`}
              >
                {other.name}
              </Link>
            </DropdownMenu.Item>
          ))}
          <DropdownMenu.Separator className="my-1 border-t border-line" />
          <DropdownMenu.Item asChild>
            <Link href="/sites/new" className={itemClassName}>
              Start another place
            </Link>
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}
