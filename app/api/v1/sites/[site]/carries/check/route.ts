import { checkCarry } from '@/app/_server/carry-check'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { carryCheckRequestSchema } from '@/lib/carry/carry-answer'

// A POST, as a list of pieces is too long for an address; it changes nothing.
export const POST = siteRoute(
  { action: 'carries:see', body: carryCheckRequestSchema },
  async ({ db, member, body, now }) => {
    const check = await checkCarry(db, member, body, now)
    return check.ok ? answer(check.value) : check
  },
)
