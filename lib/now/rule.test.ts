import { describe, expect, it } from 'vitest'
import { ruleShelf, type ShelfPiece } from './rule'

const piece = (number: string, mcPct: number, isOut = false): ShelfPiece => ({
  number,
  title: 'Ash box',
  outline: 'low',
  isOut,
  mcPct,
})

describe('pieces on the rule', () => {
  it('stand from dry to damp, together where they would overlap', () => {
    const shelf = ruleShelf([piece('3', 11), piece('1', 8.5), piece('2', 8.6)])
    expect(shelf.map(({ label, count, sub }) => [label, count, sub])).toEqual([
      ['2 pieces', 2, '1, 2'],
      ['3', 1, 'Ash box'],
    ])
    expect(shelf[0]?.mcPct).toBeCloseTo(8.55, 6)
  })

  it('never hide a piece that is out in a group that is not', () => {
    const shelf = ruleShelf([piece('1', 8.5), piece('2', 8.5, true), piece('3', 8.55)])
    expect(shelf.find((group) => group.isOut)).toMatchObject({ label: '2', count: 1 })
    expect(shelf.reduce((sum, group) => sum + group.count, 0)).toBe(3)
  })

  it('do not chain into one group over a long stretch', () => {
    const shelf = ruleShelf(Array.from({ length: 30 }, (_, n) => piece(String(n), 8 + n * 0.1)))
    expect(shelf.length).toBeGreaterThanOrEqual(8)
  })
})
