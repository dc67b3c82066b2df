import { z } from 'zod'

export const roleSchema = z.enum(['owner', 'maker', 'hand', 'onlooker'])
export type Role = z.infer<typeof roleSchema>

export const roleWords: Record<Role, string> = {
  owner: 'Owner',
  maker: 'Maker',
  hand: 'Hand',
  onlooker: 'Onlooker',
}

/** The one table of who may do what. Every route names an action; a role that is not listed is refused. */
export const whoMay = {
  'site:see': ['owner', 'maker', 'hand', 'onlooker'],
  'site:change': ['owner'],
  'site:delete': ['owner'],
  'doors:see': ['owner', 'maker', 'hand'],
  'doors:change': ['owner', 'maker'],
  'settings:own': ['owner', 'maker', 'hand', 'onlooker'],
  'members:see': ['owner', 'maker', 'hand'],
  'members:change': ['owner'],
  'invitations:see': ['owner'],
  'invitations:change': ['owner'],
  'now:see': ['owner', 'maker', 'hand', 'onlooker'],
  'rooms:see': ['owner', 'maker', 'hand', 'onlooker'],
  'rooms:readings': ['owner', 'maker', 'hand', 'onlooker'],
  'rooms:forecast': ['owner', 'maker', 'hand'],
  'rooms:change': ['owner', 'maker'],
  'readings:type': ['owner', 'maker', 'hand'],
  'sensors:see': ['owner', 'maker', 'hand'],
  'sensors:change': ['owner', 'maker'],
  'refused:see': ['owner', 'maker', 'hand'],
  'pieces:see': ['owner', 'maker', 'hand', 'onlooker'],
  'pieces:change': ['owner', 'maker'],
  'pieces:move': ['owner', 'maker', 'hand'],
  'pieces:weigh': ['owner', 'maker', 'hand'],
  'pieces:record': ['owner', 'maker', 'hand'],
  'woods:see': ['owner', 'maker', 'hand'],
  'woods:change': ['owner', 'maker'],
  'carries:see': ['owner', 'maker', 'hand'],
  'carries:do': ['owner', 'maker', 'hand'],
  'notices:see': ['owner', 'maker', 'hand'],
  'notices:acknowledge': ['owner', 'maker', 'hand'],
  'rules:see': ['owner', 'maker', 'hand'],
  'rules:change': ['owner', 'maker'],
} as const satisfies Record<string, readonly Role[]>

export type Action = keyof typeof whoMay

export function may(role: Role, action: Action): boolean {
  const roles: readonly Role[] = whoMay[action]
  return roles.includes(role)
}
