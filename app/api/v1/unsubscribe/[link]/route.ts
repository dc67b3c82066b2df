import { z } from 'zod'
import { database } from '@/app/_server/database'
import { serverConfig } from '@/app/_server/env'
import { fail } from '@/app/_server/problem'
import { overOpenLimit } from '@/app/_server/rate-limit'
import { answer } from '@/app/_server/respond'
import { openRoute, publicRoute } from '@/app/_server/route'
import { unsubscribe } from '@/app/_server/unsubscribe'

const params = { link: z.string().max(1_000) }

/** A mail program that doesn't press by itself opens the address: there is a page with a button for that. */
export const GET = publicRoute({ params }, ({ params }) => {
  const location = `${serverConfig().baseUrl}/unsubscribe/${encodeURIComponent(params.link)}`
  return new Response(null, { status: 303, headers: { location, 'cache-control': 'no-store' } })
})

// One press in a mail program (RFC 8058): it comes from the program's own server as a form, without an origin and
// without a cookie. What it may do stands in the signed link alone, so a page of another site gains nothing by it.
export const POST = openRoute({ params }, async ({ params, request, now }) => {
  const retryAfterS = overOpenLimit(request, 'unsubscribe', 60, now)
  if (retryAfterS !== undefined) return fail('too-many', undefined, { retryAfterS })
  const done = await unsubscribe(database(), params.link)
  return done.ok ? answer(done.value) : done
})
