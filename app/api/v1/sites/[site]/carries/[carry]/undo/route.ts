import { undoBringBack } from '@/app/_server/carry-steps'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

// Pressed twice, or sent again, it has happened once: the second answer is the carry as it is.
export const POST = siteRoute(
  { action: 'carries:do', params: { carry: codeSchema } },
  async ({ db, member, params, now }) => {
    const carry = await undoBringBack(db, member, params.carry, now)
    return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
  },
)
