import { closeDay } from '@/app/_server/lock-up'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { closeDaySchema } from '@/lib/lock-up/lock-up'

// Closed twice, it was closed the first time.
export const POST = siteRoute(
  { action: 'carries:do', body: closeDaySchema },
  async ({ db, member, body, now }) => {
    const closed = await closeDay(db, member, body, now)
    return closed.ok ? answer(closed.value) : closed
  },
)
