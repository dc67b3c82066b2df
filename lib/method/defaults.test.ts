import { describe, expect, it } from 'vitest'
import { GRADE_FIGURES } from '@/lib/fit/grades'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import { modelDefaults } from './defaults'
import { STATUS_WORDS } from './status'
import { productThresholds } from './thresholds'

const groups = [...modelDefaults, ...productThresholds]
const rows = groups.flatMap((group) => group.rows)
const valueOf = (what: string) => rows.find((row) => row.what === what)?.value.replaceAll('\u00a0', ' ')

describe('defaults and thresholds', () => {
  it('each has a figure, a reason, and a status that is explained', () => {
    const explained = STATUS_WORDS.map(({ status }) => status)
    expect(rows.length).toBeGreaterThan(60)
    for (const { what, value, status, why } of rows) {
      expect(`${what}: ${value}`).not.toMatch(/NaN|Infinity|undefined|: ?$/)
      expect(why.length, what).toBeGreaterThan(5)
      expect(explained, what).toContain(status)
    }
  })

  it('a group has one name, and no two rows of it are called the same', () => {
    expect(new Set(groups.map(({ id }) => id)).size).toBe(groups.length)
    for (const group of groups) {
      expect(new Set(group.rows.map(({ what }) => what)).size, group.title).toBe(group.rows.length)
    }
  })

  it('shows what the program runs on', () => {
    const { clearanceMm, allowanceMm } = GRADE_FIGURES.snug
    expect(valueOf('Fit: snug')).toBe(
      `clearance ${clearanceMm.toFixed(2)} mm; may lose ${String(allowanceMm)} mm`,
    )
    expect(valueOf('Fit: snap')).toContain('−0.05 mm')
    expect(valueOf('Two rooms closer than this cannot be told apart')).toBe(
      `${String(noTellingDifferencePct)} points of % MC`,
    )
    expect(valueOf('Told before the early edge')).toBe('a quarter of the time out, from 10 min to 60 min')
    expect(valueOf('A reading counts as present in a room that swings')).toBe(
      'three of its usual gaps, from 30 min to 120 min',
    )
  })
})
