import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { getRoomSeries, seriesQuerySchema } from '@/app/_server/series'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'rooms:readings', params: { room: codeSchema }, query: seriesQuerySchema },
  async ({ db, member, params, query, now }) => {
    const series = await getRoomSeries(db, member, params.room, query, now)
    return series.ok ? answer(series.value) : series
  },
)
