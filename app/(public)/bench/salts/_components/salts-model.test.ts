import { describe, expect, it } from 'vitest'
import { saltsQuerySchema } from '@/lib/bench/salts'
import { plainText } from '@/lib/format/sentence'
import { saltCautions, saltDoubt, saltItems, saltNames, saltsFields, saltsSentence } from './salts-model'

const bare = (text: string) => text.replaceAll('\u00a0', ' ')

describe('the salts bench', () => {
  it('says what a true sensor reads over the two usual salts', () => {
    expect(bare(plainText(saltsSentence(saltItems(20))))).toBe(
      'Sealed in with wet table salt, a true sensor reads 75.5 % RH; with wet magnesium chloride, 33.1 % RH.',
    )
  })

  it('names every salt, with its doubt', () => {
    for (const item of saltItems(12.5)) {
      expect(saltNames[item.salt].name).not.toBe('')
      expect(bare(saltDoubt(item))).toMatch(/^±0\.[1-9] % RH$/)
    }
  })

  it('warns of eyes and skin, of lithium, of food and children', () => {
    const words = saltCautions.join(' ')
    for (const word of [/eye/i, /gloves/, /lithium/i, /food/, /children/]) expect(words).toMatch(word)
  })

  it('asks for the temperatures that the API takes', () => {
    const { min, max } = saltsFields.temperatureC
    for (const [value, isGood] of [
      [min, true],
      [max, true],
      [min - 0.1, false],
      [max + 0.1, false],
    ] as const)
      expect(saltsQuerySchema.safeParse({ temperatureC: String(value) }).success).toBe(isGood)
  })
})
