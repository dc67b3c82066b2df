import { z } from 'zod'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Rule } from './notice'

export const answerSchema = z.enum(['in', 'going', 'cant', 'later', 'nothing'])
export type Answer = z.infer<typeof answerSchema>

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

const asks: ReadonlySet<Rule> = new Set(['time-nearly-out', 'time-out', 'lock-up', 'last-call', 'tub-out'])

/** Whether a notice of this rule is a question that can be answered. */
export const isQuestion = (rule: Rule): boolean => asks.has(rule)

/** What can be answered to a notice; nothing where it asks nothing. */
export function answersTo(rule: Rule): Answer[] {
  if (!isQuestion(rule)) return []
  const isEvening = rule === 'lock-up' || rule === 'last-call'
  return ['in', 'going', 'cant', ...(isEvening ? (['nothing'] as const) : []), 'later']
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
