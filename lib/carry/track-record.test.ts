import { describe, expect, it } from 'vitest'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { plainText } from '@/lib/format/sentence'
import type { Turned } from '@/lib/pieces/outcome'
import {
  expectedTurn,
  paceWords,
  trackHeadline,
  type TrackPoint,
  trackRecord,
  usedInWords,
} from './track-record'

let day = 1
const point = (turned: Turned, usedMiddle: number, over: Partial<TrackPoint> = {}): TrackPoint => ({
  ...{ number: '207', pieceId: 'p', carryId: 'c', turned, usedMiddle, isAgainstAdvice: false },
  ...{ usedSlow: usedMiddle * 0.6, usedFast: usedMiddle * 1.5 },
  at: `2026-02-${String((day += 1)).padStart(2, '0')}T12:00:00.000Z`,
  ...over,
})
const record = (points: TrackPoint[]) => trackRecord(points, new Map(), 0)

describe('how good the verdicts were', () => {
  it('keeps apart what came in by its time, what came in late and what went against the advice', () => {
    const { kept, late, against } = record([
      point('as-before', 0.2),
      point('tighter', 0.6),
      point('binds', 0.5),
      point('tighter', 0.9),
      point('as-before', 1.4, { isAgainstAdvice: true }),
    ])
    expect(kept).toEqual({ 'as-before': 1, tighter: 1, binds: 1, looser: 0, all: 3 })
    expect(late).toMatchObject({ tighter: 1, all: 1 })
    expect(against).toMatchObject({ 'as-before': 1, all: 1 })
  })

  it('counts how far what was felt lies from what the model would have had felt', () => {
    expect([0, 0.39, 0.41, 1.29, 1.31].map(expectedTurn)).toEqual([
      ...['as-before', 'as-before', 'tighter', 'tighter', 'binds'],
    ])
    const { agreement } = record([
      point('as-before', 0.1),
      point('tighter', 0.8),
      point('looser', 0.1),
      point('binds', 0.8),
      point('binds', 0.1),
    ])
    expect(agreement).toEqual({ same: 2, oneOff: 2, further: 1 })
  })

  it('says what is true of the promise alone', () => {
    const words = (points: TrackPoint[]) => plainText(trackHeadline(record(points)))
    expect(words([])).toMatch(/^Nothing to judge by yet/)
    expect(words([point('binds', 3, { isAgainstAdvice: true })])).toMatch(/^1 lid tried so far, none of them/)
    expect(words([point('as-before', 0.1), point('tighter', 0.5)])).toBe(
      'Of 2 boxes that came in within the time told, 2 still turned.',
    )
    expect(words([point('as-before', 0.1), point('binds', 0.5)])).toMatch(/1 still turned and 1 bound/)
  })

  it('has the newest first and tells the pace with its doubt', () => {
    const { points } = record([point('as-before', 0.1), point('tighter', 0.5)])
    expect((points[0]?.at ?? '') > (points[1]?.at ?? '')).toBe(true)
    expect(paceWords('medium', { ...UNLEARNED_PACE, factor: 1.2, logSpread: 0.5, outcomes: 6 })).toMatch(
      /about 1\.2 × as quickly.*from 6 carries\. For one piece, 8 chances in 10 lie between 0\.6 and 2\.3 ×/,
    )
  })
})

describe('allowance used, in words', () => {
  it('is told in words up to all of it, and in times past that', () => {
    expect([0.02, 0.5, 1, 1.84].map(usedInWords)).toEqual([
      'hardly any used',
      'about half used',
      'about all used',
      'about 1.8 times all of it',
    ])
  })
})
