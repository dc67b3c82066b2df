import { health } from '@/app/_server/health'
import { answer } from '@/app/_server/respond'
import { publicRoute } from '@/app/_server/route'

export const dynamic = 'force-dynamic'

/** For machines: whether the parts answer, and how old the newest reading is. */
export const GET = publicRoute({}, async ({ now }) => {
  const state = await health(now)
  return answer(state, { status: state.status === 'ok' ? 200 : 503 })
})
