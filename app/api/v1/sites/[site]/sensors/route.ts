import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { createSensor } from '@/app/_server/sensor-changes'
import { listSensors } from '@/app/_server/sensors'
import { newSensorSchema } from '@/lib/sensors/sensor'

export const GET = siteRoute({ action: 'sensors:see' }, async ({ db, member, now }) =>
  answer({ items: await listSensors(db, member, now), nextCursor: null }),
)

export const POST = siteRoute(
  { action: 'sensors:change', body: newSensorSchema, creates: true },
  async ({ db, member, body, now }) => {
    const sensor = await createSensor(db, member, body, now)
    if (!sensor.ok) return sensor
    return answer(sensor.value, {
      status: 201,
      etag: sensor.value.version,
      location: `/api/v1/sites/${member.siteCode}/sensors/${sensor.value.id}`,
    })
  },
)
