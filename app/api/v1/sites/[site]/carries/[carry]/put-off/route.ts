import { putOffCarry } from '@/app/_server/carry-put-off'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { carryPutOffSchema } from '@/lib/carry/carry'
import { codeSchema } from '@/lib/sites/site'

// Pressed twice, it is put off once: the body says from which hour.
export const POST = siteRoute(
  { action: 'carries:do', params: { carry: codeSchema }, body: carryPutOffSchema },
  async ({ db, member, params, body, now }) => {
    const carry = await putOffCarry(db, member, params.carry, body, now)
    return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
  },
)
