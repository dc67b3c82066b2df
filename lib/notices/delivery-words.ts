import { formatMoment } from '@/lib/format/times'

/** What became of a notice's mail to one person. */
export interface DeliveryFact {
  to: string
  state: string
  holdUntil: Date | null
  tries: number
  sentAt: Date | null
}

/** How a notice went out, in words: "E-mail to Ada and Ben", "held until 07:00", "on this page only". */
export function deliveryWords(
  deliveries: readonly DeliveryFact[],
  clock: { timeZone: string; now: Date },
): string {
  if (deliveries.length === 0) return 'on this page only'
  const parts: string[] = []
  const named = (state: string) => deliveries.filter((delivery) => delivery.state === state)
  const sent = named('sent')
  if (sent.length > 0) parts.push(`E-mail to ${listed(sent)}`)
  const held = named('held').filter(({ holdUntil }) => holdUntil !== null && holdUntil > clock.now)
  const until = held[0]?.holdUntil
  if (until !== undefined && until !== null)
    parts.push(`held until ${formatMoment(until, clock.timeZone, clock.now)} for ${listed(held)}`)
  const waiting = deliveries.filter(
    (delivery) => delivery.state === 'waiting' || (delivery.state === 'held' && !held.includes(delivery)),
  )
  if (waiting.length > 0) {
    const isDelayed = waiting.some((delivery) => delivery.tries > 0)
    parts.push(isDelayed ? `delayed for ${listed(waiting)}` : `on its way to ${listed(waiting)}`)
  }
  const lost = named('given-up')
  if (lost.length > 0) parts.push(`could not be sent to ${listed(lost)}`)
  return parts.join('; ')
}

function listed(deliveries: readonly DeliveryFact[]): string {
  const names = deliveries.map((delivery) => delivery.to)
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`
}
