import type { Kysely } from 'kysely'
import type { Database } from '@/db/schema'
import type { Action } from '@/lib/sites/permissions'
import type { Things, WorldSite } from '../support/api-world'
import type { Reply } from '../support/session'

/**
 * One row for each method of each address. `walk.test.ts` finds the addresses by the route files, asks each of them as
 * nobody, as each role and as a member of another site, and fails for a route that has no row here.
 *
 * The bracketed parts of an address are filled in by their names from `Things`: `[room]` is a room of the site.
 * `body` and `query` must be such that a member who may do it gets `status` on a fresh site. They take every id from
 * `things`, so that the walk can put ids of another site in their place.
 */
export interface Row {
  /** `anyone`: no session needed. `signed-in`: any session, no site. */
  action: Action | 'anyone' | 'signed-in'
  body?: (things: Things, site: WorldSite) => Record<string, unknown>
  query?: (things: Things) => Record<string, string>
  /** Sends version 1 as If-Match. */
  ifMatch?: true
  /** What a member who may do it gets; 200 unless it says otherwise. */
  status?: number
  /** Other servers press it too, from anywhere and with any body: what it may do stands in its address alone. */
  isPressedByServers?: true
  /** What has to be there beside the things of every fresh site. */
  prepare?: (arranging: Arranging) => Promise<unknown>
}

export interface Arranging {
  db: Kysely<Database>
  site: WorldSite
  /** Sends a request to an address below the site as its owner, and fails unless it is done. */
  asOwner: (method: string, path: string, body?: unknown) => Promise<Reply>
}
