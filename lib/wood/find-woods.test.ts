import { describe, expect, it } from 'vitest'
import { findWoods, type FindableWood, woodKindOfWords } from './find-woods'
import { SPECIES } from './species'

const own = (slug: string, commonName: string, latinName = ''): FindableWood => ({
  slug,
  commonName,
  latinName,
  isOwn: true,
})
const woods: readonly FindableWood[] = [
  ...SPECIES,
  own('own-aaaaaaaaaa', 'Hedge ash', 'Fraxinus excelsior'),
  own('own-bbbbbbbbbb', 'Burr elm, Mill Lane'),
  own('own-cccccccccc', 'Épine noire', 'Prunus spinosa'),
]
const names = (query: string) => findWoods(query, woods).woods.map((wood) => wood.commonName)

describe('finding a wood', () => {
  it.each([
    ['ash', ['Ash, European', 'Ash, white (American)', 'Hedge ash']],
    ['walnut', ['Walnut, black (American)', 'Walnut, European']],
    ['black walnut', ['Walnut, black (American)']],
    ['WALNUT  black', ['Walnut, black (American)']],
    ['juglans', ['Walnut, black (American)', 'Walnut, European']],
    ['Juglans regia', ['Walnut, European']],
    ['regia jug', ['Walnut, European']],
    ['nut europ', ['Walnut, European']],
    ['grenadilla', ['African blackwood']],
    ['linden', ['Lime']],
    ['epine', ['Épine noire']],
    ['spinosa', ['Épine noire']],
    ['wenge burr', ['Wenge']],
  ])('%s', (query, expected) => {
    expect(names(query).toSorted()).toEqual(expected.toSorted())
  })

  it('puts whole words before beginnings, and a common name before a Latin one', () => {
    const all = names('maple')
    expect(all.slice(0, 3).toSorted()).toEqual([
      'Maple (genus average)',
      'Maple, red (soft)',
      'Maple, sugar (hard)',
    ])
    expect(names('pla')[0]).toBe('Plane, London')
    expect(names('oak')[0]).toMatch(/^Oak/)
  })

  it('finds nothing for words that no wood has, though one of them is known', () => {
    expect(names('ash plywood')).toEqual([])
  })

  it('gives all of them, the own ones first, where nothing was asked', () => {
    const all = names('')
    expect(all).toHaveLength(woods.length)
    expect(all.slice(0, 3)).toEqual(['Burr elm, Mill Lane', 'Épine noire', 'Hedge ash'])
    expect(all[3]).toBe('African blackwood')
  })

  it('gives the same order whatever the order of the woods', () => {
    for (const query of ['', 'a', 'ash', 'acer', 'burl', 'an oa'])
      expect(findWoods(query, woods.toReversed()).woods).toEqual(findWoods(query, woods).woods)
  })
})

describe('a kind of wood in the words', () => {
  it.each([
    'burr walnut',
    'walnut burl',
    'Walnut burrs',
    'crotch walnut',
    'walnut curl',
    'walnut, wild grain',
  ])('%s is walnut with wild grain', (query) => {
    const found = findWoods(query, woods)
    expect(found.suggestedKind).toBe('wild')
    expect(found.woods.map((wood) => wood.slug).toSorted()).toEqual(['juglans-nigra', 'juglans-regia'])
  })

  it.each(['burl', 'burr', 'BURLS'])('%s alone leaves every wood open, one of that name first', (query) => {
    const found = findWoods(query, woods)
    expect(found.suggestedKind).toBe('wild')
    expect(found.woods).toHaveLength(woods.length)
    if (query === 'burr') expect(found.woods[0]?.commonName).toBe('Burr elm, Mill Lane')
  })

  it('knows stabilised wood in both spellings, and plain wood', () => {
    expect(woodKindOfWords('stabilized box elder')).toBe('stabilised')
    expect(woodKindOfWords('stabilised poplar')).toBe('stabilised')
    expect(woodKindOfWords('wild cherry')).toBeUndefined()
    expect(findWoods('wild cherry', woods).woods.map((wood) => wood.slug)).toEqual(['prunus-avium'])
    expect(woodKindOfWords('burnished ash')).toBeUndefined()
  })
})
