import { describe, expect, it } from 'vitest'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { type DoorCarry, doorPieces, nextPlanSentence } from './door-pieces'
import { carry as carryInput, judged, NOW } from '@/tests/support/carry'

const minute = 60_000
const now = new Date(NOW)
const clock = { timeZone: 'Europe/London', now }
const iso = (at: number) => new Date(at).toISOString()

const verdict = judged(carryInput())
const dueIn = (minutes: number): PieceCheck => ({ ...verdict, earlyAt: iso(NOW + minutes * minute) })

const carry = (pieces: [string, PieceCheck | null][], rest: Partial<DoorCarry> = {}): DoorCarry => ({
  state: 'out',
  plannedAt: iso(NOW - 70 * minute),
  stayMinutes: 60,
  pieces: pieces.map(([number, check]) => ({
    number,
    outline: 'tall',
    cover: 'open',
    outAt: rest.state === 'planned' ? null : iso(NOW - 62 * minute),
    backAt: null,
    check,
  })),
  ...rest,
})

describe('what is out, by the door', () => {
  it('tells the most pressing first, each with the moment to keep', () => {
    const shown = doorPieces(
      [
        carry([
          ['221', dueIn(300)],
          ['207', dueIn(15)],
          ['203', dueIn(-10)],
          ['209', { ...verdict, earlyAt: null }],
        ]),
      ],
      clock,
    )
    expect(
      shown.map(({ number, words, clock: at, minutesLeft }) => [number, words, at, minutesLeft]),
    ).toEqual([
      ['203', 'bring in now, due', '12:50', 0],
      ['207', 'bring in by', '13:15', 15],
      ['221', 'keeps its fit until', '18:00', 300],
      ['209', 'keeps its fit for now', '', null],
    ])
    expect(shown[1]?.since).toBe('open in work since 11:58')
  })

  it('promises nothing where the air is not known, and asks for it by the planned end', () => {
    const unknown: PieceCheck = { kind: 'unknown', reason: 'no-reading', words: '', since: null }
    const [piece] = doorPieces([carry([['207', unknown]], { stayMinutes: 120 })], clock)
    expect(piece).toMatchObject({ state: 'unknown', words: 'air not known: bring in by', clock: '13:58' })
  })

  it('leaves out what is back, and what is only planned', () => {
    const back = carry([['207', dueIn(25)]])
    const isBack = { ...back, pieces: back.pieces.map((piece) => ({ ...piece, backAt: iso(NOW) })) }
    expect(doorPieces([isBack, carry([['214', dueIn(60)]], { state: 'planned' })], clock)).toEqual([])
  })

  it('says what not to take next', () => {
    const plannedAt = iso(NOW + 60 * minute)
    const plan = (one: PieceCheck) => carry([['219', one]], { state: 'planned', plannedAt })
    expect(nextPlanSentence([plan({ ...verdict, verdict: 'leave' })], clock)).toBe(
      'At 14:00, leave 219 where it is',
    )
    expect(nextPlanSentence([plan({ ...verdict, verdict: 'keep-short' })], clock)).toBe(
      'At 14:00, keep it short with 219',
    )
    expect(nextPlanSentence([], clock)).toBe('')
  })
})
