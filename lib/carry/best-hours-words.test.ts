import { describe, expect, it } from 'vitest'
import type { BetterHour } from './better-hours'
import { bestHoursWords } from './best-hours-words'
import type { Verdict } from './carry-check'

const now = new Date('2026-03-05T13:10:00Z')
const clock = { timeZone: 'Europe/London', now }
const hour = (startsAt: string, worst: Verdict, ifLitAt: string | null = null): BetterHour => ({
  startsAt: `2026-03-${startsAt}:00.000Z`,
  ifLitAt: ifLitAt === null ? null : `2026-03-${ifLitAt}:00.000Z`,
  verdicts: [],
  worst,
  usedAtEnd: 0.5,
  emcPct: 10,
})

describe('the best hours of the week', () => {
  it('are told as one stretch of the forecast, with the lighting that they hang on', () => {
    const lit = (at: string) => hour(at, 'fine', '06T08:00')
    const hours = [
      lit('06T11:00'),
      lit('06T10:00'),
      lit('06T12:00'),
      lit('06T15:00'),
      hour('05T14:00', 'leave'),
    ]
    expect(bestHoursWords(hours, [], clock)).toBe(
      'Best hours this week: tomorrow 10:00 to 12:00 if it is lit tomorrow 08:00.',
    )
  })

  it('are told as usual beyond it, and never as a forecast', () => {
    const usual = [hour('08T10:00', 'fine'), hour('07T11:00', 'fine'), hour('09T12:00', 'leave')]
    expect(bestHoursWords([hour('05T14:00', 'keep-short')], usual, clock)).toBe(
      'Best hours this week: 14:00, for a short stay; as a rule Saturday from 11:00 and Sunday from 10:00, by the last week’s hours and no forecast.',
    )
    expect(bestHoursWords([hour('05T14:00', 'leave')], usual, clock)).toMatch(
      /^Best hours this week: as a rule Saturday from 11:00 and Sunday/,
    )
  })

  it('are left out where the strip has said it: any hour will do, or nothing is known', () => {
    const any = [hour('05T14:00', 'fine'), hour('05T15:00', 'fine')]
    expect(bestHoursWords(any, [hour('08T10:00', 'fine')], clock)).toBeNull()
    expect(bestHoursWords([hour('05T14:00', 'leave')], [], clock)).toBeNull()
    expect(bestHoursWords([], [], clock)).toBeNull()
  })

  it('say so where no day of the week is good', () => {
    expect(bestHoursWords([hour('05T14:00', 'leave')], [hour('08T10:00', 'leave')], clock)).toBe(
      'As a rule no hour later this week is good for it either.',
    )
  })
})
