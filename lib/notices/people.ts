import { quietUntil } from '@/lib/sites/local-time'
import type { NewNotice, NoticeCarry, NoticeInputs, NoticePerson } from './inputs'

export const makers = (people: NoticePerson[]) =>
  people.filter(({ role }) => role === 'owner' || role === 'maker')

export const houseList = (people: NoticePerson[]) => people.filter((person) => person.onHouseList)

/** Whoever planned it and the house list; when that person is gone, every maker. */
export function planners(people: NoticePerson[], carry: NoticeCarry): NoticePerson[] {
  const planner = people.filter((person) => person.userId === carry.madeBy)
  return [...(planner.length > 0 ? planner : makers(people)), ...houseList(people)]
}

/** Each person once; held over quiet hours, but for a maker where `wakesMakers` says so. */
export function mailTo(
  now: number,
  inputs: NoticeInputs,
  people: NoticePerson[],
  wakesMakers = false,
): NewNotice['mail'] {
  const holdUntil = quietUntil(now, inputs.site)
  const unique = [...new Map(people.map((person) => [person.userId, person])).values()]
  return unique
    .filter((person) => person.mailOn && person.role !== 'onlooker')
    .map((person) => ({
      userId: person.userId,
      holdUntil: wakesMakers && person.role !== 'hand' ? null : holdUntil,
    }))
}
