import { listReadings, sensorReadingsQuerySchema } from '@/app/_server/readings'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'sensors:see', params: { sensor: codeSchema }, query: sensorReadingsQuerySchema },
  async ({ db, member, params, query, now }) => {
    const readings = await listReadings(db, member, params.sensor, query, now)
    return readings.ok ? answer(readings.value) : readings
  },
)
