import { changeRepeat, endRepeat } from '@/app/_server/carry-repeats'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { repeatChangeSchema } from '@/lib/carry/repeat'
import { codeSchema } from '@/lib/sites/site'

const params = { repeat: codeSchema }

export const PATCH = siteRoute(
  { action: 'carries:do', params, body: repeatChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch, now }) => {
    const repeat = await changeRepeat(db, member, params.repeat, ifMatch, body, now)
    return repeat.ok ? answer(repeat.value, { etag: repeat.value.version }) : repeat
  },
)

// The plan is kept for a day, so that its end can be taken back.
export const DELETE = siteRoute(
  { action: 'carries:do', params, ifMatch: true },
  async ({ db, member, params, ifMatch, now }) => {
    const repeat = await endRepeat(db, member, params.repeat, ifMatch, now)
    return repeat.ok ? answer(undefined) : repeat
  },
)
