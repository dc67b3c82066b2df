import { describe, expect, it } from 'vitest'
import type { Severity, VerdictHold } from './inputs'
import { nextVerdictHold } from './verdict-hold'

const minute = 60_000

/** Feeds verdicts at given minutes, each with a reading of its own, and returns what is held after each. */
function heldAfter(steps: [minutes: number, severity: Severity][]): Severity[] {
  let hold: VerdictHold | undefined
  return steps.map(([minutes, severity]) => {
    hold = nextVerdictHold(hold, { severity, now: minutes * minute, airAt: minutes * minute })
    return hold.held
  })
}

describe('the verdict that counts', () => {
  it('is the first one seen', () => {
    expect(heldAfter([[0, 'keep-short']])).toEqual(['keep-short'])
  })

  it('worsens after two readings over five minutes, not before', () => {
    expect(
      heldAfter([
        [0, 'fine'],
        [1, 'leave'],
        [3, 'leave'],
        [6, 'leave'],
      ]),
    ).toEqual(['fine', 'fine', 'fine', 'leave'])
  })

  it('does not worsen on one reading looked at twice', () => {
    const first = nextVerdictHold(undefined, { severity: 'fine', now: 0, airAt: 0 })
    const second = nextVerdictHold(first, { severity: 'leave', now: minute, airAt: 7 })
    expect(nextVerdictHold(second, { severity: 'leave', now: 20 * minute, airAt: 7 }).held).toBe('fine')
    expect(nextVerdictHold(second, { severity: 'leave', now: 20 * minute, airAt: 8 }).held).toBe('leave')
  })

  it('is not moved by a value that swings about the threshold', () => {
    const swinging = Array.from({ length: 60 }, (_, i): [number, Severity] => [
      i,
      i % 2 === 0 ? 'fine' : 'leave',
    ])
    expect(new Set(heldAfter(swinging))).toEqual(new Set(['fine']))
  })

  it('gets better only after half an hour', () => {
    expect(
      heldAfter([
        [0, 'leave'],
        [1, 'fine'],
        [30, 'fine'],
        [31, 'fine'],
      ]),
    ).toEqual(['leave', 'leave', 'leave', 'fine'])
  })

  it('takes silence for worse by the time alone, as no second reading can come', () => {
    const first = nextVerdictHold(undefined, { severity: 'fine', now: 0, airAt: 0 })
    const second = nextVerdictHold(first, { severity: 'unknown', now: minute, airAt: 0 })
    expect(nextVerdictHold(second, { severity: 'unknown', now: 6 * minute, airAt: 0 }).held).toBe('unknown')
  })
})
