import { createDoor, listDoorViews } from '@/app/_server/doors'
import { serverConfig } from '@/app/_server/env'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newDoorSchema } from '@/lib/door/door'

export const GET = siteRoute({ action: 'doors:see' }, async ({ db, member }) =>
  answer({ items: await listDoorViews(db, member), nextCursor: null }),
)

export const POST = siteRoute(
  { action: 'doors:change', body: newDoorSchema, creates: true },
  async ({ db, member, body, now }) => {
    const door = await createDoor(db, member, body, { now, baseUrl: serverConfig().baseUrl })
    return door.ok ? answer(door.value, { status: 201 }) : door
  },
)
