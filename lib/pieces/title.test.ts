import { describe, expect, it } from 'vitest'
import { latinSlugOfPiece, pieceTitle, woodName } from './title'

describe('the title of a piece', () => {
  it.each([
    [{ stage: 'box', wood: 'fraxinus-americana' }, 'Ash box'],
    [{ stage: 'blank', wood: null }, 'Blank, wood not known'],
    [{ stage: 'box', wood: 'fraxinus-americana', isHidden: true }, 'Private piece'],
    [
      { stage: 'box', wood: 'own-x', ownWood: { commonName: 'Burr elm, Mill Lane', latinName: '' } },
      'Burr elm box',
    ],
    [
      { stage: 'roughed', wood: 'own-x', ownWood: { commonName: '(nameless)', latinName: '' } },
      '(nameless) roughed pair',
    ],
  ] as const)('%j: %s', (piece, title) => {
    expect(pieceTitle(piece)).toBe(title)
  })

  it("looks up an own wood's cautions by its Latin name, and a wood of the table by its slug", () => {
    const ownWood = { commonName: 'Hedge oak', latinName: 'Quercus robur' }
    expect(woodName({ wood: 'own-x', ownWood })).toBe('Hedge oak')
    expect(latinSlugOfPiece({ wood: 'own-x', ownWood })).toBe('quercus-robur')
    expect(latinSlugOfPiece({ wood: 'taxus-baccata', ownWood: null })).toBe('taxus-baccata')
    expect(latinSlugOfPiece({ wood: null })).toBeNull()
  })
})
