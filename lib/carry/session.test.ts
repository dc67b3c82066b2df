import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { carry, HOUR_MS, judged, MINUTE_MS, NOW } from '@/tests/support/carry'
import type { PieceCheck, Verdict } from './carry-check'
import { sessionOf } from './session'
import { groupCover, piecesInCover } from './ways'

const base = judged(carry())
const check = (verdict: Verdict, minutes: number | null): PieceCheck => ({
  ...base,
  verdict,
  earlyAt: minutes === null ? null : new Date(NOW + minutes * MINUTE_MS).toISOString(),
})
const piece = (number: string, verdict: Verdict, minutes: number | null) => ({
  id: number,
  number,
  check: check(verdict, minutes),
})
const clock = {
  startsAt: new Date(NOW),
  stayMinutes: 180,
  lockUpAt: '18:00',
  timeZone: 'Europe/London',
  now: new Date(NOW),
}

describe('a session', () => {
  it('works the least forgiving first, and each is back by its own edge', () => {
    const session = sessionOf(
      [piece('226', 'fine', null), piece('214', 'keep-short', 130), piece('230', 'keep-short', 70)],
      clock,
    )
    expect(session?.order.map(({ number }) => number)).toEqual(['230', '214', '226'])
    expect(session?.order.map(({ backBy }) => (Date.parse(backBy) - NOW) / MINUTE_MS)).toEqual([70, 130, 180])
    expect(session?.words).toContain('Work 230 first')
    expect(session?.words).toContain('14:10')
  })

  it('stops for all at the first edge if they stay out together, and at lock-up at the latest', () => {
    const long = { ...clock, stayMinutes: 600 }
    const session = sessionOf([piece('226', 'fine', null), piece('214', 'keep-short', 130)], long)
    expect((Date.parse(session?.stopAt ?? '') - NOW) / MINUTE_MS).toBe(130)
    expect(session?.endsAt).toBe('2026-03-05T18:00:00.000Z')
    expect(session?.isByLockUp).toBe(true)
    const evening = { ...long, startsAt: new Date(NOW + 6 * HOUR_MS) }
    const late = sessionOf([piece('226', 'fine', null), piece('205', 'fine', null)], evening)
    expect(late?.isByLockUp).toBe(false)
  })

  it('leaves out what should stay, and is none for fewer than two', () => {
    expect(sessionOf([piece('219', 'leave', 10), piece('214', 'keep-short', 130)], clock)).toBeNull()
    const blank: PieceCheck = { kind: 'words', reason: 'blank', words: 'A blank.', second: '' }
    expect(sessionOf([{ id: 'b', number: '2', check: blank }, piece('214', 'fine', null)], clock)).toBeNull()
  })

  it('names what half an hour each leaves no time for', () => {
    const session = sessionOf(
      [
        piece('1', 'keep-short', 35),
        piece('2', 'keep-short', 50),
        piece('3', 'keep-short', 65),
        piece('4', 'fine', null),
      ],
      clock,
    )
    expect(session?.order.map(({ number }) => number)).toEqual(['1', '3', '4'])
    expect(session?.leftOver).toEqual(['2'])
    expect(session?.words).toContain('no time for 2')
  })

  it('no other order keeps more of them within their time', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 30, max: 170 }), { minLength: 2, maxLength: 6 }), (edges) => {
        const session = sessionOf(
          edges.map((minutes, n) => piece(String(n), 'keep-short', minutes)),
          clock,
        )
        const kept = session?.order.length ?? 0
        // As many of the edges as could each be given a half hour of its own, in whichever order.
        const best = Math.max(
          ...Array.from({ length: 2 ** edges.length }, (_, subset) => {
            const chosen = edges.filter((_edge, n) => ((subset >> n) & 1) === 1).toSorted((a, b) => a - b)
            return chosen.every((edge, n) => (n + 1) * 30 <= edge) ? chosen.length : 0
          }),
        )
        expect(kept).toBe(best)
      }),
      { numRuns: 60, endOnFailure: true },
    )
  })
})

describe('all of them in one cover', () => {
  const asked = [
    {
      ...piece('219', 'leave', 10),
      covers: [edge('lid-on', 'leave', 15), edge('bagged', 'fine', null), edge('tub', 'keep-short', 100)],
    },
    { ...piece('226', 'fine', null), covers: [] },
  ]
  function edge(cover: 'lid-on' | 'bagged' | 'tub', verdict: Verdict, minutes: number | null) {
    return {
      cover,
      verdict,
      earlyAt: minutes === null ? null : new Date(NOW + minutes * MINUTE_MS).toISOString(),
    }
  }

  it('is the one in which the most keep their fit', () => {
    expect(groupCover(asked, 'open')?.cover).toBe('bagged')
    expect(groupCover(asked.slice(1), 'open')).toBeUndefined()
  })

  it('what is fine as asked is fine in any that is more shut; a more open one is not known', () => {
    expect(piecesInCover(asked, 'open', 'tub')?.map(({ verdict }) => verdict)).toEqual(['keep-short', 'fine'])
    expect(piecesInCover(asked, 'bagged', 'open')).toBeUndefined()
  })
})
