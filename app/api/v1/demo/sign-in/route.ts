import { signInToDemo } from '@/app/_server/demo'
import { answer, answerResponse } from '@/app/_server/respond'
import { publicRoute } from '@/app/_server/route'

export const POST = publicRoute({}, async ({ db, now }) => {
  const signedIn = await signInToDemo(db, now)
  if (!signedIn.ok) return signedIn
  const response = answerResponse(answer({ site: signedIn.value.site }).value)
  for (const cookie of signedIn.value.setCookies) response.headers.append('set-cookie', cookie)
  return response
})
