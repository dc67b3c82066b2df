import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { heldSpans, type Sample } from './hold'

const hourMs = 3_600_000
/** "o" over, "-" between, "c" clear, " " no record: an hour each. */
const samplesOf = (course: string): Sample[] =>
  [...course].flatMap((sign, n) => {
    const level = { o: 'over', '-': 'between', c: 'clear' }[sign] as Sample['level'] | undefined
    return level === undefined ? [] : [{ at: n * hourMs, endsAt: (n + 1) * hourMs, level }]
  })
/** "2-5" for a span that was told at hour 2 and over at hour 5; "2-" while it lasts; "wait" before it has held. */
const spansOf = (course: string, hold = { over: 2, clear: 2 }) =>
  heldSpans(samplesOf(course), hold).map(({ heldAt, endedAt }) =>
    heldAt === null
      ? 'wait'
      : `${String(heldAt / hourMs)}-${endedAt === null ? '' : String(endedAt / hourMs)}`,
  )

describe('a condition on record', () => {
  it.each([
    ['nothing over', 'cc--cc', []],
    ['over for too short a time', 'cocc', []],
    ['over at the last look only', 'ccco', ['wait']],
    ['over long enough', 'coo-', ['3-']],
    ['to and fro at the limit', 'coo-o-oo-o', ['3-']],
    ['clear for too short a time', 'oocoocoo', ['2-']],
    ['clear long enough', 'oo-cc', ['2-5']],
    ['twice', 'ooccooccc', ['2-4', '6-8']],
    ['a gap before it has held', 'o o', ['wait']],
    ['a gap while it lasts', 'oo  oo', ['2-']],
    ['a gap breaks what is clear as well', 'ooc c', ['2-']],
  ])('%s', (_, course, spans) => {
    expect(spansOf(course)).toEqual(spans)
  })

  it('never begins a span before the one before is over, nor ends one that was not told', () => {
    const course = fc
      .array(fc.constantFrom('o', '-', 'c', ' '), { maxLength: 60 })
      .map((signs) => signs.join(''))
    fc.assert(
      fc.property(
        course,
        fc.integer({ min: 1, max: 4 }),
        fc.integer({ min: 1, max: 4 }),
        (text, over, clear) => {
          const spans = heldSpans(samplesOf(text), { over, clear })
          spans.forEach((span, n) => {
            const before = spans[n - 1]
            if (before !== undefined) expect(before.endedAt ?? Infinity).toBeLessThanOrEqual(span.beganAt)
            if (span.endedAt !== null) expect(span.heldAt).not.toBeNull()
          })
        },
      ),
    )
  })

  it('is told the same by each later look, as long as the record only grows', () => {
    const course = fc
      .array(fc.constantFrom('o', '-', 'c'), { minLength: 2, maxLength: 40 })
      .map((signs) => signs.join(''))
    fc.assert(
      fc.property(course, fc.nat(), (text, cut) => {
        const earlier = spansOf(text.slice(0, 1 + (cut % text.length))).filter((span) => span !== 'wait')
        const later = spansOf(text)
        earlier.forEach((span, n) => expect(later[n]?.startsWith(span)).toBe(true))
      }),
    )
  })
})
