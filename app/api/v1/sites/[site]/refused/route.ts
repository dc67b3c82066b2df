import { listRefusedMessages, refusedQuerySchema } from '@/app/_server/readings'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute(
  { action: 'refused:see', query: refusedQuerySchema },
  async ({ db, member, query }) => {
    const refused = await listRefusedMessages(db, member, query)
    return refused.ok ? answer(refused.value) : refused
  },
)
