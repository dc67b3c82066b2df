import { describe, expect, it } from 'vitest'
import { feltQuerySchema } from '@/lib/rooms/felt'
import { feltAskedOf, feltQueryOf } from './felt-asked'

describe('what the address of a room asks of its wood', () => {
  it('is a wood and a thickness, and nothing that can’t be', () => {
    expect(feltAskedOf('prunus-avium', '18.5')).toEqual({ wood: 'prunus-avium', ownMm: 18.5 })
    for (const wrong of [undefined, null, '', 'x y', ['prunus-avium', 'b']])
      expect(feltAskedOf(wrong, null).wood).toBeNull()
    for (const wrong of [undefined, null, '', '0.4', '101', 'thick', ['4', '5']])
      expect(feltAskedOf(null, wrong).ownMm).toBeNull()
  })

  it('is a query that the API takes, with the three of the rule always among them', () => {
    expect(feltQuerySchema.parse(feltQueryOf({ wood: null, ownMm: null }))).toEqual({
      thicknessMm: [4, 10, 25],
      days: 30,
    })
    const own = feltQuerySchema.parse(feltQueryOf({ wood: 'own-2345678923', ownMm: 18.5 }))
    expect(own).toMatchObject({ thicknessMm: [4, 10, 18.5, 25], wood: 'own-2345678923' })
  })
})
