import { z } from 'zod'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import { type Answer, answerSchema } from './answer'
import type { Mark, Rule } from './notice'

/** When to be asked again: in a quarter of an hour, in an hour, tomorrow morning. */
export const laterSchema = z.enum(['quarter', 'hour', 'morning'])
export type Later = z.infer<typeof laterSchema>

export const newAnswerSchema = z
  .strictObject({ answer: answerSchema, later: laterSchema.optional() })
  .refine(({ answer, later }) => (answer === 'later') === (later !== undefined), {
    path: ['later'],
    error: 'say when with "later", and only with it',
  })
export type NewAnswer = z.infer<typeof newAnswerSchema>

export const answerViaSchema = z.enum(['page', 'mail', 'push'])
export type AnswerVia = z.infer<typeof answerViaSchema>

/** Rules whose notices are questions that can be answered. */
export const questionRules: ReadonlySet<Rule> = new Set([
  'time-nearly-out',
  'time-out',
  'lock-up',
  'last-call',
  'tub-out',
])

/** What can be answered to a notice; nothing where it asks nothing. `mark` "unknown": nothing is logged out. */
export function answersTo({ rule, mark }: { rule: Rule; mark: Mark }): Answer[] {
  if (!questionRules.has(rule)) return []
  if (rule === 'tub-out') return ['in', 'going', 'later']
  return mark === 'unknown' ? ['nothing', 'going', 'later'] : ['in', 'going', 'cant', 'later']
}

/** On a button. */
export const answerWords: Readonly<Record<Exclude<Answer, 'later'>, string>> = {
  in: 'It’s in',
  going: 'Going now',
  cant: 'Can’t, tell the next',
  nothing: 'Nothing is out',
}
export const laterWords: Readonly<Record<Later, string>> = {
  quarter: 'In 15 min',
  hour: 'In an hour',
  morning: 'Tomorrow 07:00',
}

/** What an answer leads to, told before it is given. */
export const answerMeans: Readonly<Record<Exclude<Answer, 'later'>, string>> = {
  in: 'What is out is set down as back in, now, where it came from.',
  going: 'Nobody else is asked; you are asked again in 15 min if it is still out.',
  cant: 'The next person on the house list is asked.',
  nothing: 'It is set down that nothing is out tonight.',
}
export const laterMeans: Readonly<Record<Later, string>> = {
  quarter: 'You are asked again in 15 min, if it is still out.',
  hour: 'You are asked again in an hour, if it is still out.',
  morning: 'You are asked again tomorrow at 07:00, if it is still out.',
}

/** What somebody answered, in a list: "Ada is going". */
export const answeredWords: Readonly<Record<Answer, string>> = {
  in: 'said that it is in',
  going: 'said they are going',
  cant: 'said they can’t',
  later: 'will be asked again',
  nothing: 'said that nothing is out',
}

const minuteMs = 60_000
/** When the morning begins for "tomorrow". A guess: the end of usual quiet hours. */
const morning = '07:00'

/** When to ask again, epoch ms. */
export function laterUntil(now: number, later: Later, timeZone: string): number {
  if (later === 'quarter') return now + 15 * minuteMs
  if (later === 'hour') return now + 60 * minuteMs
  return instantOfLocalTime(daysAfter(dayOfInstant(new Date(now), timeZone), 1), morning, timeZone)
}

/** Links in mails work for this long: by then the question is stale. A guess. */
export const answerLinkMs = 48 * 60 * minuteMs
