import { createRepeat, listRepeats } from '@/app/_server/carry-repeats'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newRepeatSchema } from '@/lib/carry/repeat'

export const GET = siteRoute({ action: 'carries:see' }, async ({ db, member, now }) =>
  answer({ items: await listRepeats(db, member, now), nextCursor: null }),
)

export const POST = siteRoute(
  { action: 'carries:do', body: newRepeatSchema, creates: true },
  async ({ db, member, body, now }) => {
    const repeat = await createRepeat(db, member, body, now)
    if (!repeat.ok) return repeat
    return answer(repeat.value, { status: 201, etag: repeat.value.version })
  },
)
