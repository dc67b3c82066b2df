import { describe, expect, it } from 'vitest'
import { plainText } from '@/lib/format/sentence'
import { movedWords, piecesHeadline as headlineParts, quarterTurnWords, usedWords } from './wording'

const piecesHeadline = (...of: Parameters<typeof headlineParts>) => plainText(headlineParts(...of))
const numbers = (...of: string[]) => of.map((number) => ({ number }))

describe('the sentence over the pieces', () => {
  it('says that nothing is logged out, never that nothing is out', () => {
    expect(piecesHeadline([], true)).toBe('Nothing is logged out.')
  })
  it('asks for the first piece', () => {
    expect(piecesHeadline([], false)).toContain('Five answers')
  })
  it('names who is out', () => {
    expect(piecesHeadline(numbers('207'), true)).toBe('207 is logged out; nothing else is.')
    expect(piecesHeadline(numbers('207', '219', '224'), true)).toBe('207, 219 and 224 are logged out.')
    expect(piecesHeadline(numbers('1', '2', '3', '4', '5', '6'), true)).toBe(
      '1, 2, 3 and 3 more are logged out.',
    )
  })
})

describe('how the lid should turn', () => {
  it.each([
    [0, 'as it did'],
    [0.5, 'a little closer'],
    [0.9, 'tight, easy, tight, easy'],
    [1, 'may bind'],
    [3, 'never force it'],
  ])('with %f of the allowance used', (usedFraction, words) => {
    expect(quarterTurnWords({ usedFraction })).toContain(words)
  })

  it('says so when it can’t be worked out, rather than that all is well', () => {
    expect(quarterTurnWords({ usedFraction: null })).toContain('can’t be worked out')
  })

  it('never says that a lid is safe or binds for certain', () => {
    for (const used of [0, 0.3, 0.7, 1.2])
      expect(quarterTurnWords({ usedFraction: used })).not.toMatch(/safe|binds/)
  })

  it('puts the share in words that grow with it', () => {
    const words = [0, 0.25, 0.5, 0.75, 1, 2].map(usedWords)
    expect(new Set(words).size).toBe(6)
    expect(words[0]).toContain('none')
    expect(words[5]).toContain('more than')
  })
})

const plainSpaces = (text: string) => text.replaceAll('\u00a0', ' ')

describe('the figures behind it', () => {
  const mc = {
    ringMcPct: 10.6,
    lidMcPct: 10.6,
    cutMcPct: 9.2,
    doubtPct: 0.7,
    usedFraction: 0.5,
    lossMm: 0.1,
    allowanceMm: 0.2,
  }
  it('tells damper from drier, in points and in the reader’s own lengths', () => {
    expect(plainSpaces(movedWords(mc, 'metric'))).toBe(
      'It stands 1.4 points damper than where its joint was cut, which takes about 0.10 mm of the 0.20 mm that it may lose at a quarter turn.',
    )
    expect(plainSpaces(movedWords({ ...mc, ringMcPct: 8.2 }, 'imperial'))).toContain('1.0 point drier')
    expect(plainSpaces(movedWords(mc, 'imperial'))).toContain('0.004 in')
  })
  it('gives no figure for what is too little to tell', () => {
    const words = movedWords({ ...mc, ringMcPct: 9.3, lidMcPct: 9.3, lossMm: 0.01 }, 'metric')
    expect(plainSpaces(words)).toContain('which takes next to nothing of the 0.20 mm')
  })
  it('leaves the millimetres out when they aren’t known', () => {
    expect(plainSpaces(movedWords({ ...mc, lossMm: null }, 'metric'))).toBe(
      'It stands 1.4 points damper than where its joint was cut.',
    )
  })
})
