import { formatMoment } from '@/lib/format/times'
import type { Channel } from './inputs'

/** What became of a notice on its way to one person by one channel. */
export interface DeliveryFact {
  to: string
  channel: Channel
  state: string
  holdUntil: Date | null
  tries: number
  sentAt: Date | null
  /** Why it could not be sent, or was not needed any more. */
  why: string | null
}

/** How a notice went out, in words: "E-mail to Ada and Ben, on the phone of Ada", "held until 07:00 for Ben". */
export function deliveryWords(
  deliveries: readonly DeliveryFact[],
  clock: { timeZone: string; now: Date },
): string {
  const parts: string[] = []
  const named = (state: string, channel?: Channel) =>
    deliveries.filter((one) => one.state === state && (channel === undefined || one.channel === channel))
  const mailed = named('sent', 'mail')
  if (mailed.length > 0) parts.push(`E-mail to ${listed(mailed)}`)
  const pushed = named('sent', 'push')
  if (pushed.length > 0) parts.push(`${mailed.length > 0 ? 'on' : 'On'} the phone of ${listed(pushed)}`)
  const held = named('held').filter(({ holdUntil }) => holdUntil !== null && holdUntil > clock.now)
  for (const group of byMoment(held)) {
    const until = formatMoment(group.until, clock.timeZone, clock.now)
    parts.push(`held until ${until} for ${listed(group.deliveries)}`)
  }
  const waiting = deliveries.filter(
    (delivery) => delivery.state === 'waiting' || (delivery.state === 'held' && !held.includes(delivery)),
  )
  if (waiting.length > 0) {
    const isDelayed = waiting.some((delivery) => delivery.tries > 0)
    parts.push(isDelayed ? `delayed for ${listed(waiting)}` : `on its way to ${listed(waiting)}`)
  }
  for (const lost of named('given-up')) {
    const by = lost.channel === 'mail' ? 'by e-mail' : 'on the phone'
    parts.push(`could not be sent to ${lost.to} ${by}${lost.why === null ? '' : `: ${lost.why}`}`)
  }
  // What was let go is no news where something else went out.
  if (parts.length > 0) return parts.join('; ')
  return deliveries.length > 0 ? 'not needed any more before it could be sent' : 'on this page only'
}

/** Held until the same moment, told together; soonest first. */
function byMoment(held: readonly DeliveryFact[]): { until: Date; deliveries: DeliveryFact[] }[] {
  const groups = new Map<number, { until: Date; deliveries: DeliveryFact[] }>()
  for (const one of held) {
    if (one.holdUntil === null) continue
    const at = one.holdUntil.getTime()
    groups.set(at, { until: one.holdUntil, deliveries: [...(groups.get(at)?.deliveries ?? []), one] })
  }
  return [...groups.values()].toSorted((a, b) => a.until.getTime() - b.until.getTime())
}

/** Each person once, however many channels. */
function listed(deliveries: readonly DeliveryFact[]): string {
  const names = [...new Set(deliveries.map((delivery) => delivery.to))]
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`
}
