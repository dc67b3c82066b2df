import { getRoomFelt } from '@/app/_server/felt'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { feltQuerySchema } from '@/lib/rooms/felt'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'rooms:readings', params: { room: codeSchema }, query: feltQuerySchema },
  async ({ db, member, params, query, now }) => {
    const felt = await getRoomFelt(db, member, params.room, query, now)
    return felt.ok ? answer(felt.value) : felt
  },
)
