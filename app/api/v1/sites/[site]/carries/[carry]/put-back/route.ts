import { putBackCarry } from '@/app/_server/carry-put-off'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'carries:do', params: { carry: codeSchema } },
  async ({ db, member, params, now }) => {
    const carry = await putBackCarry(db, member, params.carry, now)
    return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
  },
)
