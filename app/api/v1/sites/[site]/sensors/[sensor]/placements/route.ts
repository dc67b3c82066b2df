import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { moveSensor } from '@/app/_server/sensor-changes'
import { getSensor } from '@/app/_server/sensors'
import { newPlacementSchema } from '@/lib/sensors/sensor'
import { codeSchema } from '@/lib/sites/site'

const params = { sensor: codeSchema }

export const GET = siteRoute({ action: 'sensors:see', params }, async ({ db, member, params, now }) => {
  const sensor = await getSensor(db, member, params.sensor, now)
  return sensor.ok ? answer({ items: sensor.value.placements, nextCursor: null }) : sensor
})

export const POST = siteRoute(
  { action: 'sensors:change', params, body: newPlacementSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    const sensor = await moveSensor(db, member, params.sensor, body, now)
    return sensor.ok ? answer(sensor.value, { status: 201, etag: sensor.value.version }) : sensor
  },
)
