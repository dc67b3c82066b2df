import type { Role } from './permissions'
import type { UnitSystem } from './site'

/** Who reads a page of a site, as far as the page's words and buttons depend on it. Plain, so that it can be a prop. */
export interface Reader {
  /** The site's code, as it stands in addresses. */
  site: string
  siteName: string
  role: Role
  timeZone: string
  units: UnitSystem
  /** The instant for which the server drew the page. */
  at: string
}

/** The reader's view of a membership, at the instant of the page. */
export function readerOf(
  member: { siteCode: string; role: Role; timeZone: string; unitSystem: UnitSystem; site: { name: string } },
  now: Date,
): Reader {
  return {
    site: member.siteCode,
    siteName: member.site.name,
    role: member.role,
    timeZone: member.timeZone,
    units: member.unitSystem,
    at: now.toISOString(),
  }
}
