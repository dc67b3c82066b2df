import { typeReading } from '@/app/_server/readings'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { typedReadingSchema } from '@/lib/rooms/room'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'readings:type', params: { room: codeSchema }, body: typedReadingSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    const reading = await typeReading(db, member, params.room, body, now)
    return reading.ok ? answer(reading.value, { status: 201 }) : reading
  },
)
