import { answer } from '@/app/_server/respond'
import { createRoom, listRooms } from '@/app/_server/rooms'
import { siteRoute } from '@/app/_server/route'
import { newRoomSchema } from '@/lib/rooms/room'

export const GET = siteRoute({ action: 'rooms:see' }, async ({ db, member, now }) =>
  answer({ items: await listRooms(db, member, now), nextCursor: null }),
)

export const POST = siteRoute(
  { action: 'rooms:change', body: newRoomSchema, creates: true },
  async ({ db, member, body, now }) => {
    const room = await createRoom(db, member, body, now)
    if (!room.ok) return room
    return answer(room.value, {
      status: 201,
      etag: room.value.version,
      location: `/api/v1/sites/${member.siteCode}/rooms/${room.value.id}`,
    })
  },
)
