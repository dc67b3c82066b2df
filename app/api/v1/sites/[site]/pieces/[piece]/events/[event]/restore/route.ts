import { setEventUndone } from '@/app/_server/piece-events'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'pieces:record', params: { piece: codeSchema, event: codeSchema } },
  async ({ db, member, params, now }) => {
    const event = await setEventUndone(db, member, params, false, now)
    return event.ok ? answer(event.value) : event
  },
)
