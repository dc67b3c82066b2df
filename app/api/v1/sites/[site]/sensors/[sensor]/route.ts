import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { renameSensor, retireSensor } from '@/app/_server/sensor-changes'
import { getSensor } from '@/app/_server/sensors'
import { sensorChangeSchema } from '@/lib/sensors/sensor'
import { codeSchema } from '@/lib/sites/site'

const params = { sensor: codeSchema }

export const GET = siteRoute({ action: 'sensors:see', params }, async ({ db, member, params, now }) => {
  const sensor = await getSensor(db, member, params.sensor, now)
  return sensor.ok ? answer(sensor.value, { etag: sensor.value.version }) : sensor
})

export const PATCH = siteRoute(
  { action: 'sensors:change', params, body: sensorChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch, now }) => {
    const sensor = await renameSensor(db, member, params.sensor, ifMatch, body, now)
    return sensor.ok ? answer(sensor.value, { etag: sensor.value.version }) : sensor
  },
)

export const DELETE = siteRoute(
  { action: 'sensors:change', params, ifMatch: true },
  async ({ db, member, params, ifMatch, now }) => {
    const gone = await retireSensor(db, member, params.sensor, ifMatch, now)
    return gone.ok ? answer(undefined) : gone
  },
)
