import { describe, expect, it } from 'vitest'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { plainText } from '@/lib/format/sentence'
import { eveningOf } from './evening'
import type { LockUp } from './lock-up'
import { lastsTheNight, lockUpHeadline, nightWords, notYetClosable } from './words'

const site = { timeZone: 'Europe/London', lockUpAt: '18:00', quietFrom: '22:00', quietTo: '07:00' }
const clock = { timeZone: 'Europe/London', now: new Date('2026-02-10T18:00:00Z') }
const iso = (at: number | null) => (at === null ? null : new Date(at).toISOString())

describe('the evening', () => {
  it('has its lock-up, its last call and its morning by the clock of the place', () => {
    const evening = eveningOf(new Date('2026-06-10T16:30:00Z'), site)
    expect(evening).toMatchObject({ dayOn: '2026-06-10', isEvening: true })
    expect(iso(evening.lockUpAt)).toBe('2026-06-10T17:00:00.000Z')
    expect(iso(evening.lastCallAt)).toBe('2026-06-10T20:30:00.000Z')
    expect(iso(evening.morningAt)).toBe('2026-06-11T06:00:00.000Z')
  })

  it('still is the same evening after midnight, and is over by the morning', () => {
    expect(eveningOf(new Date('2026-02-11T01:00:00Z'), site)).toMatchObject({
      dayOn: '2026-02-10',
      isEvening: true,
    })
    expect(eveningOf(new Date('2026-02-11T08:00:00Z'), site)).toMatchObject({
      dayOn: '2026-02-11',
      isEvening: false,
    })
  })

  it('has no last call without quiet hours', () => {
    const evening = eveningOf(clock.now, { ...site, quietFrom: '00:00', quietTo: '00:00' })
    expect(evening.lastCallAt).toBeNull()
    expect(iso(evening.morningAt)).toBe('2026-02-11T07:00:00.000Z')
  })

  it('has a shorter night when the clocks go forward', () => {
    const evening = eveningOf(new Date('2026-03-28T19:00:00Z'), site)
    expect(iso(evening.morningAt)).toBe('2026-03-29T06:00:00.000Z')
  })
})

const morningAt = '2026-02-11T07:00:00.000Z'
const verdict = (earlyAt: string | null) =>
  ({ kind: 'verdict', earlyAt }) as Extract<PieceCheck, { kind: 'verdict' }>
const piece = (number: string, check: PieceCheck | null, isOverdue = false) =>
  ({ id: number, number, outAt: '2026-02-10T12:00:00Z', backAt: null, check, isOverdue }) as CarryPiece
const lockUp = (pieces: CarryPiece[], over: Partial<LockUp> = {}) =>
  ({
    out: [{ toRoom: { name: 'the shop' }, pieces } as Carry],
    used: null,
    nothingElse: null,
    closed: null,
    morningAt,
    ...over,
  }) as LockUp
const answered = { at: '2026-02-10T18:05:00Z', by: null }

describe('what is said at lock-up', () => {
  it('asks after what is out, the overdue one first', () => {
    const late = piece('221', verdict('2026-02-10T13:35:00Z'), true)
    const fine = piece('207', verdict('2026-02-10T18:10:00Z'))
    expect(plainText(lockUpHeadline(lockUp([fine, late])))).toBe(
      'Still in the shop: 221 and 207. Are they in?',
    )
    expect(nightWords(late, morningAt, clock)).toMatch(/^It was due in by 13:35\. If it is still out/)
    expect(nightWords(fine, morningAt, clock)).toBe('Good until 18:10; not for the night.')
  })

  it('tells apart what lasts the night, what does not and what nobody can say', () => {
    expect(lastsTheNight(piece('1', verdict(null)), morningAt)).toBe(true)
    expect(lastsTheNight(piece('1', verdict('2026-02-11T07:00:00Z')), morningAt)).toBe(true)
    expect(lastsTheNight(piece('1', verdict('2026-02-11T06:59:00Z')), morningAt)).toBe(false)
    expect(lastsTheNight(piece('1', null), morningAt)).toBeUndefined()
  })

  it('never says that nothing is out, only that nothing is logged out', () => {
    expect(plainText(lockUpHeadline(lockUp([])))).toMatch(/^Nothing logged out\./)
    expect(plainText(lockUpHeadline(lockUp([], { closed: answered })))).toMatch(/nothing logged out/)
    expect(plainText(lockUpHeadline(lockUp([], { used: 'warmed' })))).toMatch(
      /anything out that isn’t logged/,
    )
  })

  it('closes the day only once every question is answered', () => {
    const one = lockUp([piece('207', verdict(null))], { used: 'warmed' })
    expect(notYetClosable(one, new Set())).toBe('207 first: is it in?')
    expect(notYetClosable(one, new Set(['207']))).toMatch(/anything else/)
    expect(notYetClosable({ ...one, nothingElse: answered }, new Set(['207']))).toBeUndefined()
    expect(notYetClosable(lockUp([]), new Set())).toBeUndefined()
  })
})
