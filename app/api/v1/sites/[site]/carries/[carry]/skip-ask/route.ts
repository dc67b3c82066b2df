import { z } from 'zod'
import { skipAsk } from '@/app/_server/carry-ask'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

// Passed over twice, it is passed over once.
export const POST = siteRoute(
  { action: 'pieces:record', params: { carry: codeSchema }, body: z.strictObject({ pieceId: z.string() }) },
  async ({ db, member, params, body, now }) => {
    const carry = await skipAsk(db, member, params.carry, body.pieceId, now)
    return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
  },
)
