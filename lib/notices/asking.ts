import type { Episode, NewNotice, NoticeAnswer, NoticeCarry, NoticePerson, NoticeState } from './inputs'
import { houseList, makers, recipients } from './people'
import { askAgainAfterMs } from './policy'

/** A question that wants an answer, and whom it goes on to. */
export interface Ask {
  /** The notice by which it was asked first. */
  base: NewNotice
  /** Names the question for what follows; the same for the two notices of one outing. */
  askKey: string
  /** Episodes whose answers count: rule is not looked at, so that an answer before the edge counts at the edge. */
  episode: Pick<Episode, 'subject' | 'key'>
  /** The house list beyond those who were asked first, in order. */
  rest: readonly NoticePerson[]
  /** Without an answer for this long, the rest is asked; null: never. */
  restAfterMs: number | null
}

/** What was answered to a question, oldest first. */
export function answersOf(
  state: NoticeState,
  { subject, key }: Pick<Episode, 'subject' | 'key'>,
): NoticeAnswer[] {
  return (state.answers ?? [])
    .filter((one) => one.subject === subject && one.episodeKey === key)
    .toSorted((a, b) => a.at - b.at)
}

/**
 * What follows once a question has been asked and its piece is still out: "going now" is asked again after a quarter
 * of an hour, "later" at its hour, "can't" goes to the next of the house list, silence to the rest of it.
 */
export function followUps(now: number, state: NoticeState, people: NoticePerson[], ask: Ask): NewNotice[] {
  const { base, askKey } = ask
  if (!state.told.has(base.key)) return []
  const answers = answersOf(state, ask.episode)
  const latest = [...new Map(answers.map((answer) => [answer.userId, answer])).values()]
  const again = latest.flatMap(({ userId, answer, at, until }) => {
    const askedAgainAt = answer === 'going' ? at + askAgainAfterMs : answer === 'later' ? until : null
    if (askedAgainAt === null || now < askedAgainAt) return []
    const to = people.filter((person) => person.userId === userId)
    return to.length === 0
      ? []
      : [{ ...base, key: `${askKey}/again/${new Date(at).toISOString()}/${userId}`, to: recipients(to) }]
  })
  const refused = new Set(answers.filter(({ answer }) => answer === 'cant').map(({ userId }) => userId))
  const willing = ask.rest.filter(({ userId }) => !refused.has(userId))
  const refusedFirst = [...refused].filter((userId) => !ask.rest.some((one) => one.userId === userId)).length
  const refusedRest = refused.size - refusedFirst
  // Each "can't" brings in one more; whoever of the rest can't either hands it on in turn.
  const next = ask.rest.slice(0, refusedFirst + refusedRest).filter(({ userId }) => !refused.has(userId))
  return [
    ...again,
    ...next.map((person) => ({ ...base, key: `${askKey}/next/${person.userId}`, to: recipients([person]) })),
    ...restOf(
      now,
      state,
      ask,
      answers,
      willing.filter((person) => !next.includes(person)),
    ),
  ]
}

/** The rest of the house list, when nobody has answered, or only those who can't. */
function restOf(
  now: number,
  state: NoticeState,
  { base, askKey, episode, restAfterMs }: Ask,
  answers: readonly NoticeAnswer[],
  rest: readonly NoticePerson[],
): NewNotice[] {
  const toldAt = (state.known ?? []).find(
    (one) => one.rule === base.rule && one.subject === episode.subject && one.key === episode.key,
  )?.toldAt
  if (restAfterMs === null || toldAt === undefined || toldAt === null || rest.length === 0) return []
  if (answers.some(({ answer }) => answer !== 'cant')) return []
  const since = Math.max(toldAt, ...answers.map(({ at }) => at))
  if (now < since + restAfterMs) return []
  return [{ ...base, key: `${askKey}/rest`, to: recipients([...rest]) }]
}

const householders = (people: NoticePerson[]): NoticePerson[] =>
  houseList(people).filter(({ role }) => role !== 'onlooker')

/** Who is asked first: whoever took it out (every maker where that person has left) and the first of the house list. */
export function askedFirst(people: NoticePerson[], carry?: NoticeCarry): NoticePerson[] {
  const planner = people.filter((person) => carry !== undefined && person.userId === carry.madeBy)
  const own = planner.length > 0 ? planner : makers(people)
  const first = householders(people).find((person) => !own.includes(person))
  return first === undefined ? own : [...own, first]
}

/** The house list beyond those who are asked first, in its order. */
export function houseListRest(people: NoticePerson[], carry?: NoticeCarry): NoticePerson[] {
  const first = askedFirst(people, carry)
  return householders(people).filter((person) => !first.includes(person))
}
