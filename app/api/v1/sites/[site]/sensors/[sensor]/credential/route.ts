import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { renewCredential } from '@/app/_server/sensor-changes'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'sensors:change', params: { sensor: codeSchema }, creates: true },
  async ({ db, member, params, now }) => {
    const credential = await renewCredential(db, member, params.sensor, now)
    return credential.ok ? answer(credential.value, { status: 201 }) : credential
  },
)
