import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime, quietUntil, type QuietHours } from '@/lib/sites/local-time'
import type {
  NewNotice,
  NoticeInputs,
  NoticePerson,
  PersonWishes,
  PlannedDelivery,
  Recipient,
} from './inputs'
import { houseList, makers } from './people'

/** What holds for a person who has chosen nothing. */
export const usualWishes: PersonWishes = {
  pushOn: false,
  rules: {},
  quiet: null,
  timeZone: null,
  digest: 'none',
  digestAt: '07:30',
  digestWeekday: 1,
  away: null,
  sessionUntil: null,
}

/**
 * How and when each person hears of a notice. Whoever is away is stood in for; whoever is at work hears without a sound
 * while the house list hears it too; quiet hours and digests are each person's own, by their own clock. Nobody is told
 * twice of one notice by one channel, and whatever is held has an end.
 */
export function deliveriesOf(now: number, notice: NewNotice, inputs: NoticeInputs): PlannedDelivery[] {
  const asked = notice.to.flatMap((recipient) => standIns(now, recipient, inputs.people))
  const hearing = withHouseList(now, notice, asked, inputs.people)
  const once = new Map<string, Recipient>()
  for (const one of hearing)
    once.set(one.userId, { ...one, wakes: one.wakes || once.get(one.userId)?.wakes === true })
  return [...once.values()].flatMap((recipient) => {
    const person = inputs.people.find(({ userId }) => userId === recipient.userId)
    return person === undefined ? [] : deliveriesTo(now, notice, person, recipient.wakes, inputs.site)
  })
}

const isAway = (now: number, { wishes }: NoticePerson): boolean =>
  wishes?.away !== undefined && wishes.away !== null && now >= wishes.away.from && now < wishes.away.until

/** The person, or who covers for them while they are away; the makers where nobody does; in the end they themselves. */
function standIns(now: number, recipient: Recipient, people: NoticePerson[]): Recipient[] {
  const seen = new Set<string>()
  let person = people.find(({ userId }) => userId === recipient.userId)
  if (person === undefined) return []
  while (person !== undefined && isAway(now, person) && !seen.has(person.userId)) {
    seen.add(person.userId)
    const cover: string | null = person.wishes?.away?.coveredBy ?? null
    person = people.find(({ userId, role }) => userId === cover && role !== 'onlooker')
  }
  if (person !== undefined && !isAway(now, person)) return [{ ...recipient, userId: person.userId }]
  const others = makers(people).filter((maker) => !isAway(now, maker))
  return others.length === 0 ? [recipient] : others.map(({ userId }) => ({ ...recipient, userId }))
}

const isAtWork = (now: number, person: NoticePerson | undefined): boolean =>
  (person?.wishes?.sessionUntil ?? 0) > now

/** What presses and would reach somebody at work goes to the house list besides: they may not look up for an hour. */
function withHouseList(now: number, notice: NewNotice, to: Recipient[], people: NoticePerson[]): Recipient[] {
  const reachesWork = to.some(({ userId }) =>
    isAtWork(
      now,
      people.find((person) => person.userId === userId),
    ),
  )
  if (!reachesWork || notice.urgency === 'whenever') return to
  const instead = houseList(people)
    .filter((person) => person.role !== 'onlooker' && !isAtWork(now, person))
    .flatMap(({ userId }) => standIns(now, { userId, wakes: false }, people))
  return [...to, ...instead]
}

function deliveriesTo(
  now: number,
  notice: NewNotice,
  person: NoticePerson,
  wakes: boolean,
  site: QuietHours,
): PlannedDelivery[] {
  const wishes = person.wishes ?? usualWishes
  const own = wishes.rules[notice.rule]
  const clock = clockOf(wishes, site)
  const heldMs = wakes ? null : heldUntil(now, notice.urgency, wishes, clock)
  const atWorkMs = isAtWork(now, person) ? wishes.sessionUntil : null
  const deliveries: PlannedDelivery[] = []
  if (own?.mailOn ?? person.mailOn)
    deliveries.push({
      userId: person.userId,
      channel: 'mail',
      holdUntil: atWorkMs === null ? heldMs : afterQuiet(Math.max(atWorkMs, heldMs ?? 0), wakes, clock),
    })
  // A phone shows it at once during a session, without a sound: see the delivery of pushes.
  if (wishes.pushOn && (own?.pushOn ?? true))
    deliveries.push({ userId: person.userId, channel: 'push', holdUntil: heldMs })
  return deliveries
}

/** A person's own quiet hours by their own clock; each that they left open is the site's. */
export const clockOf = (wishes: PersonWishes, site: QuietHours): QuietHours => ({
  timeZone: wishes.timeZone ?? site.timeZone,
  quietFrom: wishes.quiet?.from ?? site.quietFrom,
  quietTo: wishes.quiet?.to ?? site.quietTo,
})

/** Until when it waits for this person, epoch ms; null: it goes at once. Only what can wait waits for a digest. */
function heldUntil(
  now: number,
  urgency: NewNotice['urgency'],
  wishes: PersonWishes,
  clock: QuietHours,
): number | null {
  if (urgency !== 'whenever' || wishes.digest === 'none') return quietUntil(now, clock)
  return afterQuiet(nextDigest(now, wishes, clock.timeZone), false, clock)
}

const afterQuiet = (at: number, wakes: boolean, clock: QuietHours): number =>
  wakes ? at : (quietUntil(at, clock) ?? at)

/** The first digest after `now`, epoch ms. */
export function nextDigest(
  now: number,
  { digest, digestAt, digestWeekday }: Pick<PersonWishes, 'digest' | 'digestAt' | 'digestWeekday'>,
  timeZone: string,
): number {
  const today = dayOfInstant(new Date(now), timeZone)
  // Eight days hold every weekday once more after the one whose hour has passed.
  for (let days = 0; days <= 8; days += 1) {
    const day = daysAfter(today, days)
    if (digest === 'weekly' && isoWeekday(day) !== digestWeekday) continue
    const at = instantOfLocalTime(day, digestAt, timeZone)
    if (at > now) return at
  }
  throw new RangeError(`no weekday ${String(digestWeekday)}: it has to be from 1 to 7`)
}

/** ISO: 1 is Monday. A calendar day has no zone, so it is looked at in UTC. */
const isoWeekday = (day: string): number => new Date(`${day}T00:00:00Z`).getUTCDay() || 7
