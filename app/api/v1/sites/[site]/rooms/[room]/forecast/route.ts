import { getRoomForecast } from '@/app/_server/forecast'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'rooms:forecast', params: { room: codeSchema } },
  async ({ db, member, params, now }) => {
    const forecast = await getRoomForecast(db, member, params.room, now)
    return forecast.ok ? answer(forecast.value) : forecast
  },
)
