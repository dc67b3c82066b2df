import { describe, expect, it } from 'vitest'
import { pieceFiltersOf, pieceQuery } from './list-address'

describe('the address of the list of pieces', () => {
  it('reads what it writes', () => {
    const filters = { q: 'ash', stage: 'box', room: 'abc', out: 'yes', sort: '-wood' } as const
    const read = pieceFiltersOf(Object.fromEntries(new URLSearchParams(pieceQuery(filters))))
    expect(read).toEqual(filters)
  })

  it('passes over what it doesn’t know', () => {
    expect(pieceFiltersOf({ stage: 'tree', sort: 'colour', out: 'maybe', q: ['a', 'b'], x: '1' })).toEqual({
      q: '',
      stage: null,
      room: null,
      out: null,
      sort: 'number',
    })
  })

  it('leaves empty filters out and trims the search', () => {
    const query = pieceQuery({
      q: `  ${'a'.repeat(80)} `,
      stage: null,
      room: null,
      out: null,
      sort: 'number',
    })
    expect(query).toBe(`limit=50&sort=number&q=${'a'.repeat(60)}`)
  })
})
