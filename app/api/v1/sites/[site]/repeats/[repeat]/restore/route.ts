import { restoreRepeat } from '@/app/_server/carry-repeats'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'carries:do', params: { repeat: codeSchema } },
  async ({ db, member, params, now }) => {
    const repeat = await restoreRepeat(db, member, params.repeat, now)
    return repeat.ok ? answer(repeat.value, { etag: repeat.value.version }) : repeat
  },
)
