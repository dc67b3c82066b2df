import type { NoticeCarry, NoticePerson, Recipient } from './inputs'

export const makers = (people: NoticePerson[]) =>
  people.filter(({ role }) => role === 'owner' || role === 'maker')

export const houseList = (people: NoticePerson[]) => people.filter((person) => person.onHouseList)

/** Whoever planned it and the house list; when that person is gone, every maker. */
export function planners(people: NoticePerson[], carry: NoticeCarry): NoticePerson[] {
  const planner = people.filter((person) => person.userId === carry.madeBy)
  return [...(planner.length > 0 ? planner : makers(people)), ...houseList(people)]
}

/** Each person once. `wakesMakers`: makers are told even in quiet hours. */
export function recipients(people: NoticePerson[], wakesMakers = false): Recipient[] {
  const unique = [...new Map(people.map((person) => [person.userId, person])).values()]
  return unique
    .filter((person) => person.role !== 'onlooker')
    .map((person) => ({ userId: person.userId, wakes: wakesMakers && person.role !== 'hand' }))
}
