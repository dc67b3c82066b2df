import { describe, expect, it } from 'vitest'
import { plainText } from '@/lib/format/sentence'
import { benchCut, cutFields, type CutField } from './cut-model'
import type { FitChoices } from './fit-fields'

const values = Object.fromEntries(
  Object.entries(cutFields).map(([key, field]) => [key, Number(field.start)]),
) as Record<CutField, number>
const choices: FitChoices = {
  wood: 'prunus-serotina',
  kind: 'plain',
  grain: 'end-grain',
  fit: 'own',
  lidWood: '',
  tell: 'mc',
  lid: 'same',
}

describe('may it be cut today', () => {
  it('says first what to do', () => {
    const cut = benchCut(values, 58, choices, 'snug', 'metric')
    expect(plainText(cut?.words.headline ?? [])).toMatch(/^Cut it easy: leave about 0\.10/)
    expect(cut?.answers.find(({ holds }) => holds)?.verdict).toBe('cut-easy')
  })

  it('a side-grain joint moves more, so it is judged more strictly', () => {
    const cut = benchCut(values, 58, { ...choices, grain: 'side-grain' }, 'snug', 'metric')
    expect(cut?.check).toMatchObject({ verdict: 'rest' })
  })

  it('has only words for wild grain', () => {
    const cut = benchCut(values, 58, { ...choices, kind: 'wild' }, 'snug', 'metric')
    expect(cut?.check.kind).toBe('words')
    expect(cut?.answers).toEqual([])
  })

  it('judges nothing against a year that is turned round', () => {
    expect(benchCut({ ...values, yearHighPct: 7 }, 58, choices, 'snug', 'metric')).toBeUndefined()
  })
})
