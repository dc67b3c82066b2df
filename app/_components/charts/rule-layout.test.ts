import { describe, expect, it } from 'vitest'
import { placeLabels, spread, textWidth, twoLines } from './rule-layout'

const gapsOf = (middles: number[], size: number) =>
  middles.slice(1).map((at, index) => at - (middles[index] ?? 0) - size)

describe('words beside the stems of the moisture rule', () => {
  it('leaves words that have room on the lower level, to the right of their stem', () => {
    expect(
      placeLabels(
        [
          { x: 100, width: 90 },
          { x: 400, width: 90 },
        ],
        900,
      ),
    ).toEqual([
      { level: 0, side: 'right' },
      { level: 0, side: 'right' },
    ])
  })

  it('turns the last word to the left where the rule ends', () => {
    expect(placeLabels([{ x: 880, width: 90 }], 900)).toEqual([{ level: 0, side: 'left' }])
  })

  it('never lets two words or a word and a taller stem meet, six rooms within four points', () => {
    const labels = [150, 185, 245, 295, 560, 690].map((x) => ({ x, width: 95 }))
    const places = placeLabels(labels, 960)
    const boxes = places.map((place, index) => {
      const { x, width } = labels[index] ?? { x: 0, width: 0 }
      return {
        ...place,
        x,
        from: place.side === 'right' ? x : x - width,
        to: place.side === 'right' ? x + width : x,
      }
    })
    for (const a of boxes) {
      for (const b of boxes) {
        if (a === b) continue
        if (a.level === b.level) expect(a.from >= b.to || b.from >= a.to).toBe(true)
        if (a.level > b.level) expect(a.x > b.from && a.x < b.to).toBe(false)
      }
    }
  })

  it('answers for a dozen rooms at one value without hanging', () => {
    expect(
      placeLabels(
        Array.from({ length: 12 }, () => ({ x: 300, width: 100 })),
        960,
      ),
    ).toHaveLength(12)
  })

  it('takes semibold words for wider', () => {
    expect(textWidth('Landing cupboard', true)).toBeGreaterThan(textWidth('Landing cupboard'))
  })
})

describe('things along the shelf', () => {
  it('leaves alone what does not touch', () => {
    expect(
      spread(
        [
          { at: 100, size: 40 },
          { at: 300, size: 40 },
        ],
        0,
        900,
      ),
    ).toEqual([100, 300])
  })

  it('parts what stands in one place, evenly to both sides', () => {
    const middles = spread(
      Array.from({ length: 3 }, () => ({ at: 200, size: 50 })),
      0,
      900,
    )
    expect(middles).toEqual([150, 200, 250])
  })

  it('keeps order and never lets neighbours touch', () => {
    const wishes = [60, 80, 81, 90, 300, 310, 880].map((at) => ({ at, size: 60 }))
    const middles = spread(wishes, 0, 900)
    expect([...middles].sort((a, b) => a - b)).toEqual(middles)
    for (const gap of gapsOf(middles, 60)) expect(gap).toBeGreaterThanOrEqual(-1e-9)
    expect(middles[0]).toBeGreaterThanOrEqual(30)
    expect(middles.at(-1)).toBeLessThanOrEqual(870)
  })

  it('shares the line when there is too much on it', () => {
    const middles = spread(
      Array.from({ length: 10 }, () => ({ at: 50, size: 100 })),
      0,
      500,
    )
    expect(middles[0]).toBeCloseTo(25)
    expect(middles.at(-1)).toBeCloseTo(475)
  })
})

describe('words beside a piece on a phone', () => {
  it('stay on one line when they fit and break between words when not', () => {
    expect(twoLines('out', 90)).toEqual(['out'])
    expect(twoLines('', 90)).toEqual([])
    expect(twoLines('resting in the house', 100)).toEqual(['resting in the', 'house'])
    expect(twoLines('unbreakablywide', 20)).toEqual(['unbreakablywide'])
  })
})
