import { quietUntil } from '@/lib/sites/local-time'
import type { NewNotice, NoticeInputs, PlannedDelivery } from './inputs'

/** How and when each person hears of a notice: by their channels, held over quiet hours unless it wakes them. */
export function deliveriesOf(now: number, notice: NewNotice, inputs: NoticeInputs): PlannedDelivery[] {
  const holdUntil = quietUntil(now, inputs.site)
  return notice.to.flatMap(({ userId, wakes }): PlannedDelivery[] => {
    const person = inputs.people.find((one) => one.userId === userId)
    if (person?.mailOn !== true) return []
    return [{ userId, channel: 'mail', holdUntil: wakes ? null : holdUntil }]
  })
}
