import { describe, expect, it } from 'vitest'
import { plainText, strongTexts } from '@/lib/format/sentence'
import type { RoomFelt } from './felt'
import { feltDoubtWords, feltGapWords, feltSentence, shareWords } from './felt-words'

const one = (thicknessMm: number, mcPct: number, over: Partial<RoomFelt['felt'][number]> = {}) => ({
  thicknessMm,
  mcPct,
  doubtPct: 0.6,
  unknownShare: 0.01,
  memoryDays: 30,
  ...over,
})
const felt = (over: Partial<RoomFelt> = {}): RoomFelt => ({
  wood: { id: 'fraxinus-excelsior', commonName: 'Ash, European', densityKgM3: 680, isDensityAssumed: false },
  at: '2026-03-05T13:00:00.000Z',
  recordFrom: '2025-01-05T00:00:00.000Z',
  felt: [one(4, 9.12), one(10, 8.8), one(25, 8.41)],
  course: { at: [], emcPct: [], felt: [] },
  completeTo: '2026-03-05T13:00:00.000Z',
  age: 120,
  ...over,
})
const told = {
  timeZone: 'Europe/London',
  units: 'metric',
  role: 'maker',
  now: new Date('2026-03-05T13:02:00Z'),
} as const
const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('what wood has felt, in words', () => {
  it('is one sentence, the unit said once', () => {
    const sentence = feltSentence(felt(), 'metric')
    expect(plain(plainText(sentence))).toBe(
      'Ash of 4 mm here has felt 9.1 % MC so far, 10 mm 8.8 and 25 mm 8.4.',
    )
    expect(strongTexts(sentence).map(plain)).toEqual(['9.1 % MC', '8.8', '8.4'])
  })

  it('is in inches for who reads inches, and says wood where none was named', () => {
    const wood = { id: null, commonName: null, densityKgM3: 650, isDensityAssumed: true }
    expect(plain(plainText(feltSentence(felt({ wood, felt: [one(25.4, 8)] }), 'imperial')))).toBe(
      'Wood of 1.00 in here has felt 8.0 % MC so far.',
    )
    expect(feltSentence(felt({ felt: [] }), 'metric')).toEqual([])
  })

  it('tells the doubt once, or for each thickness where they differ', () => {
    expect(plain(feltDoubtWords(felt(), 'metric'))).toBe('Give or take 0.6 points of % MC.')
    const apart = felt({ felt: [one(4, 9), one(25, 8.4, { doubtPct: 1.3 })] })
    expect(plain(feltDoubtWords(apart, 'metric'))).toBe(
      'Give or take, in points of % MC: 0.6 points for 4 mm and 1.3 points for 25 mm.',
    )
  })

  it('names a gap that still shows, and the record that is too short', () => {
    expect(feltGapWords(felt(), told)).toEqual([])
    const gap = felt({ felt: [one(4, 9), one(25, 8.4, { unknownShare: 0.33 })] })
    expect(feltGapWords(gap, told).map(plain)).toEqual([
      'About a third of what 25 mm has felt rests on hours without a reading: the doubt is wider for it.',
    ])
    const young = felt({
      recordFrom: '2026-02-20T08:00:00.000Z',
      felt: [one(10, 8.8, { unknownShare: 0.5 }), one(25, 8.4, { unknownShare: 0.9 })],
    })
    expect(feltGapWords(young, told).map(plain)).toEqual([
      'About half of what 10 mm has felt and nearly all of what 25 mm has felt rest on the time before the record began on 20 February, or on hours without a reading: the doubt is wider for it.',
    ])
  })

  it('says so where the wood is slower than what is looked at', () => {
    const slow = felt({
      recordFrom: '2024-12-01T00:00:00.000Z',
      felt: [one(60, 14.7, { unknownShare: 0.66, memoryDays: 400 })],
    })
    expect(feltGapWords(slow, told).map(plain)).toEqual([
      'About two thirds of what 60 mm has felt rests on air of more than 400 days ago, which is not looked at, or on hours without a reading: the doubt is wider for it.',
    ])
  })

  it('says since when nothing was heard, and that onlookers see whole days', () => {
    const silent = felt({ completeTo: '2026-03-05T09:40:00.000Z' })
    expect(feltGapWords(silent, told)[0]).toContain('Nothing was heard here since 09:40.')
    expect(feltGapWords(silent, { ...told, role: 'onlooker' })[0]).toContain('whole days')
    expect(feltGapWords(felt({ at: null, felt: [] }), told)).toEqual([])
  })

  it('has a word for every share', () => {
    expect([0.1, 0.25, 0.34, 0.5, 0.66, 0.8, 0.9, 1].map(shareWords)).toEqual([
      'about a tenth',
      'about a quarter',
      'about a third',
      'about half',
      'about two thirds',
      'most',
      'nearly all',
      'all',
    ])
  })
})
