import { changeCarry, getCarry } from '@/app/_server/carries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { carryChangeSchema } from '@/lib/carry/carry'
import { codeSchema } from '@/lib/sites/site'

const params = { carry: codeSchema }

export const GET = siteRoute({ action: 'carries:see', params }, async ({ db, member, params, now }) => {
  const carry = await getCarry(db, member, params.carry, now)
  return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
})

export const PATCH = siteRoute(
  { action: 'carries:do', params, body: carryChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch, now }) => {
    const carry = await changeCarry(db, member, params.carry, ifMatch, body, now)
    return carry.ok ? answer(carry.value, { etag: carry.value.version }) : carry
  },
)
