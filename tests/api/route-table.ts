import type { Kysely } from 'kysely'
import type { Database } from '@/db/schema'
import type { Action } from '@/lib/sites/permissions'
import type { Things, WorldSite } from '../support/api-world'

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
  /** What has to be there beside the things of every fresh site. */
  prepare?: (db: Kysely<Database>, site: WorldSite) => Promise<void>
}

export const routeTable: Record<string, Row> = {
  'GET /api/health': { action: 'anyone' },
  'GET /api/v1/demo/inbox': { action: 'anyone' },
  'POST /api/v1/demo/sign-in': { action: 'anyone' },

  'GET /api/v1/sites': { action: 'signed-in' },
  'POST /api/v1/sites': {
    action: 'signed-in',
    body: () => ({
      name: 'New Yard',
      timeZone: 'Europe/London',
      rooms: [{ name: 'Landing cupboard', kind: 'cupboard' }],
    }),
    status: 201,
  },
  'GET /api/v1/invitations/[invitation]': { action: 'signed-in', status: 403 },
  'POST /api/v1/invitations/[invitation]/accept': { action: 'signed-in', status: 403 },

  'GET /api/v1/sites/[site]': { action: 'site:see' },
  'PATCH /api/v1/sites/[site]': {
    action: 'site:change',
    body: () => ({ name: 'Renamed Yard', lockUpAt: '17:30' }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]': {
    action: 'site:delete',
    body: (_, { siteName }) => ({ name: siteName }),
    status: 204,
  },
  'GET /api/v1/sites/[site]/frame': { action: 'site:see' },

  'GET /api/v1/sites/[site]/members': { action: 'members:see' },
  'PATCH /api/v1/sites/[site]/members/[member]': {
    action: 'members:change',
    body: () => ({ role: 'hand' }),
  },
  'DELETE /api/v1/sites/[site]/members/[member]': { action: 'members:change', status: 204 },
  'GET /api/v1/sites/[site]/members/me': { action: 'settings:own' },
  'PATCH /api/v1/sites/[site]/members/me': {
    action: 'settings:own',
    body: () => ({ unitSystem: 'imperial', onHouseList: true }),
  },
  'DELETE /api/v1/sites/[site]/members/me': {
    action: 'settings:own',
    status: 204,
    prepare: async (db, { things }) => {
      // A second owner, so that the first may go.
      await db.updateTable('member').set({ role: 'owner' }).where('id', '=', things.member).execute()
    },
  },
  'GET /api/v1/sites/[site]/invitations': { action: 'invitations:see' },
  'POST /api/v1/sites/[site]/invitations': {
    action: 'invitations:change',
    body: () => ({ email: 'somebody.new@example.org', role: 'maker' }),
    status: 201,
  },
  'DELETE /api/v1/sites/[site]/invitations/[invitation]': { action: 'invitations:change', status: 204 },
  'POST /api/v1/sites/[site]/invitations/[invitation]/resend': { action: 'invitations:change' },

  'GET /api/v1/sites/[site]/rooms': { action: 'rooms:see' },
}
