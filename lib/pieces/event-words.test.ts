import { describe, expect, it } from 'vitest'
import { newEventSchema } from './event'
import { eventTitle, eventWood } from './event-words'
import { learnedWords } from './learned-words'

/** Figures and units are held together by spaces that don't break. */
const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('an entry in words', () => {
  it('tells a fit by its grade and what its wood was', () => {
    const fit = {
      kind: 'final-fit',
      data: { fitGrade: 'easy', ringMcPct: 8.92, lidMcPct: 8.5, doubtPct: 0.6, basis: 'followed' },
    } as const
    expect(eventTitle(fit, 'metric')).toBe('Final fit, an easy lid')
    expect(plain(eventWood(fit))).toBe(
      'Its wood stood at about 8.9 % MC, its lid at 8.5 % MC, give or take 0.6 points.',
    )
  })

  it('says where nobody followed its wood, and where nothing is known of it', () => {
    const month = { ringMcPct: 9, lidMcPct: 9, doubtPct: 1.5, basis: 'month-mean' } as const
    expect(eventWood({ kind: 're-true', data: month })).toMatch(/nobody followed it then.*mean of that month/)
    expect(eventWood({ kind: 're-true', data: {} })).toMatch(/Nothing is known of its wood then/)
    expect(eventWood({ kind: 'oil', data: {} })).toBe('')
  })

  it('tells a meter reading in % MC', () => {
    expect(plain(eventTitle({ kind: 'meter', data: { mcPct: 12 } }, 'metric'))).toBe(
      'Meter reading, 12.0 % MC',
    )
  })
})

describe('a new entry', () => {
  it('tells how a lid fits only with a fit, and % MC only with a meter', () => {
    expect(newEventSchema.safeParse({ kind: 'final-fit', fitGrade: 'easy' }).success).toBe(true)
    expect(newEventSchema.safeParse({ kind: 'oil', fitGrade: 'easy' }).success).toBe(false)
    expect(newEventSchema.safeParse({ kind: 'meter' }).success).toBe(false)
    expect(newEventSchema.safeParse({ kind: 'note', mcPct: 12 }).success).toBe(false)
  })
})

describe('what a site has learned', () => {
  it('is told with how many carries it rests on', () => {
    expect(learnedWords({ movementClass: 'medium', factor: 1.24, outcomes: 6 })).toBe(
      'Wood of medium movement follows about 1.2 × as quickly here as the formula has it, from 6 carries.',
    )
    expect(learnedWords({ movementClass: 'small', factor: 0.98, outcomes: 1 })).toMatch(
      /follows as quickly here .* from 1 carry/,
    )
  })
})
