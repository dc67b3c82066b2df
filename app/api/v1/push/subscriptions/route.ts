import { signPhoneUp, takePhoneBack } from '@/app/_server/push-subscriptions'
import { answer } from '@/app/_server/respond'
import { signedInRoute } from '@/app/_server/route'
import { newPhoneSchema, phoneGoneSchema } from '@/lib/notices/delivery'

// Without Idempotency-Key: an address is signed up once, however often it is sent.
export const POST = signedInRoute({ body: newPhoneSchema }, async ({ db, user, body, now }) => {
  const done = await signPhoneUp(db, user.id, body, now)
  return done.ok ? answer(undefined) : done
})

export const DELETE = signedInRoute({ body: phoneGoneSchema }, async ({ db, user, body }) => {
  await takePhoneBack(db, user.id, body.endpoint)
  return answer(undefined)
})
