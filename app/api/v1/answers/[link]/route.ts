import { z } from 'zod'
import { followAnswerLink } from '@/app/_server/notice-answers'
import { fail } from '@/app/_server/problem'
import { overOpenLimit } from '@/app/_server/rate-limit'
import { answer } from '@/app/_server/respond'
import { publicRoute } from '@/app/_server/route'

const params = { link: z.string().max(1_000) }

// Without a session: the link says who it is. Only a POST from a page or a service worker of ours does what it stands
// for, never a GET, as mail scanners open whatever stands in a mail.
export const POST = publicRoute({ params }, async ({ db, params, request, now }) => {
  const retryAfterS = overOpenLimit(request, 'answers', 60, now)
  if (retryAfterS !== undefined) return fail('too-many', undefined, { retryAfterS })
  const done = await followAnswerLink(db, params.link, now)
  return done.ok ? answer(done.value) : done
})
