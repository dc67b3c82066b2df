import { type Action, may, type Role } from './permissions'

/** What a role is for, told to the person who gets it. */
export const roleDeeds: Readonly<Record<Role, string>> = {
  owner: 'An owner runs the site: members and roles, the place’s settings, and everything that a maker does.',
  maker: 'A maker turns and finishes: rooms, sensors and their secrets, pieces, woods and carries.',
  hand: 'A hand sees all, plans and starts carries, brings pieces back, moves them, and hears “bring it in”.',
  onlooker: 'An onlooker sees what is shared, rooms by the day only, and changes nothing.',
}

/** Lines of the table of who may do what, each with the actions that it stands for. */
const deeds: readonly { words: string; actions: readonly Action[] }[] = [
  {
    words: 'See what is shared; rooms by the day only for onlookers',
    actions: ['now:see', 'rooms:see', 'pieces:see'],
  },
  {
    words: 'See members, sensors, woods and notices',
    actions: ['members:see', 'sensors:see', 'woods:see', 'notices:see'],
  },
  {
    words: 'Plan, start and bring back carries; move pieces; type readings; acknowledge notices',
    actions: ['carries:do', 'pieces:move', 'readings:type', 'notices:acknowledge'],
  },
  {
    words: 'Change rooms, sensors, pieces and woods',
    actions: ['rooms:change', 'sensors:change', 'pieces:change', 'woods:change'],
  },
  {
    words: 'Change the place, its members and invitations; delete the site',
    actions: ['site:change', 'members:change', 'invitations:change', 'site:delete'],
  },
]

/** The same table that the server goes by, in words: a line is ticked for a role that may do all of it. */
export const roleTable = (roles: readonly Role[]): { words: string; may: boolean[] }[] =>
  deeds.map(({ words, actions }) => ({
    words,
    may: roles.map((role) => actions.every((action) => may(role, action))),
  }))
