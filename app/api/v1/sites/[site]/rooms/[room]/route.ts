import { answer } from '@/app/_server/respond'
import { archiveRoom, changeRoom, getRoom } from '@/app/_server/rooms'
import { siteRoute } from '@/app/_server/route'
import { roomChangeSchema } from '@/lib/rooms/room'
import { codeSchema } from '@/lib/sites/site'

const params = { room: codeSchema }

export const GET = siteRoute({ action: 'rooms:see', params }, async ({ db, member, params, now }) => {
  const room = await getRoom(db, member, params.room, now)
  return room.ok ? answer(room.value, { etag: room.value.version }) : room
})

export const PATCH = siteRoute(
  { action: 'rooms:change', params, body: roomChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch, now }) => {
    const room = await changeRoom(db, member, params.room, ifMatch, body, now)
    return room.ok ? answer(room.value, { etag: room.value.version }) : room
  },
)

export const DELETE = siteRoute(
  { action: 'rooms:change', params, ifMatch: true },
  async ({ db, member, params, ifMatch, now }) => {
    const gone = await archiveRoom(db, member, params.room, ifMatch, now)
    return gone.ok ? answer(undefined) : gone
  },
)
