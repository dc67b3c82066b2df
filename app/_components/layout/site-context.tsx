'use client'

import { createContext, type ReactNode, useContext } from 'react'
import type { Role } from '@/lib/sites/permissions'
import type { UnitSystem } from '@/lib/sites/site'

/** What nearly every view of a site needs to put figures and times into words. */
export type SiteContextValue = {
  site: string
  siteName: string
  timeZone: string
  units: UnitSystem
  role: Role
  isDemo: boolean
}

const SiteContext = createContext<SiteContextValue | null>(null)

export function SiteProvider({ value, children }: { value: SiteContextValue; children: ReactNode }) {
  return <SiteContext value={value}>{children}</SiteContext>
}

/** @throws outside a site's frame: a bug. */
export function useSite(): SiteContextValue {
  const value = useContext(SiteContext)
  if (!value) throw new Error('useSite must be used inside a SiteShell')
  return value
}
