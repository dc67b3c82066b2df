import { carriesQuerySchema, createCarry, listCarries } from '@/app/_server/carries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newCarrySchema } from '@/lib/carry/carry'

export const GET = siteRoute(
  { action: 'carries:see', query: carriesQuerySchema },
  async ({ db, member, query, now }) => {
    const carries = await listCarries(db, member, query, now)
    return carries.ok ? answer(carries.value) : carries
  },
)

export const POST = siteRoute(
  { action: 'carries:do', body: newCarrySchema, creates: true },
  async ({ db, member, body, now }) => {
    const carry = await createCarry(db, member, body, now)
    if (!carry.ok) return carry
    return answer(carry.value, {
      status: 201,
      etag: carry.value.version,
      location: `/api/v1/sites/${member.siteCode}/carries/${carry.value.id}`,
    })
  },
)
