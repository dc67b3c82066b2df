import type { z } from 'zod'
import { fail, failField } from '@/app/_server/problem'
import { overOpenLimit } from '@/app/_server/rate-limit'
import { answer } from '@/app/_server/respond'
import { publicRoute, type RouteHandler } from '@/app/_server/route'
import type { Result } from '@/lib/result'

/** The same question has the same answer for everybody; an hour is short enough to mend a wrong one. */
const CACHE = 'public, max-age=3600'
/** All askers share it where no proxy names them, so it is far above what people turning dials ask. Status: guess. */
const MOST_PER_MINUTE = 3000

type Refusal = { readonly code: 'not-possible'; readonly path: string; readonly message: string }

/** One open calculator: no account, a strict query, an answer that may be cached. */
export function benchRoute<T>(
  query: z.ZodType<T>,
  answerOf: (asked: T) => Result<object, Refusal>,
): RouteHandler {
  return publicRoute({ query }, (asked) => {
    const waitS = overOpenLimit(asked.request, 'bench', MOST_PER_MINUTE, asked.now)
    if (waitS !== undefined) {
      return fail('too-many', 'That is a lot of questions. Wait a minute, then go on.', {
        retryAfterS: waitS,
      })
    }
    const found = answerOf(asked.query)
    if (!found.ok) return failField(found.error.code, found.error.path, found.error.message)
    return answer(found.value, { cache: CACHE })
  })
}
