import { getForgotten } from '@/app/_server/forgotten'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'carries:see', params: { carry: codeSchema } },
  async ({ db, member, params, now }) => {
    const forgotten = await getForgotten(db, member, params.carry, now)
    return forgotten.ok ? answer(forgotten.value) : forgotten
  },
)
