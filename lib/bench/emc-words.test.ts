import { describe, expect, it } from 'vitest'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { warmingAnswer } from './air'
import { emcSentence, humiditySentence, sensorDoubtWords, warmingWords } from './emc-words'

const bare = (text: string) => text.replaceAll('\u00a0', ' ')

describe('words of the EMC bench', () => {
  it('say where wood ends, with the doubt, and stress the one figure', () => {
    expect(bare(plainText(emcSentence(13.62, 0.71)))).toBe(
      'Left in this air, wood ends at about 13.6 % MC, give or take 0.7 % MC.',
    )
    expect(strongTexts(emcSentence(13.62, 0.71)).map(bare)).toEqual(['13.6 % MC'])
  })

  it('say what air holds it, in the unit of the reader', () => {
    const air = { temperatureC: 20, humidityPct: 48.3, emcPct: 9 }
    expect(bare(plainText(humiditySentence(air, 'imperial')))).toBe(
      'To hold wood at 9.0 % MC, keep air of 68 °F at about 48 % RH.',
    )
    expect(sensorDoubtWords('imperial')).toContain('±0.5 °F')
  })

  it('give figures of warmed air, and none where water falls out', () => {
    const warmed = warmingWords(warmingAnswer({ fromC: 8, fromHumidityPct: 85, toC: 15 }))
    expect(bare(warmed.figure)).toBe('53 % RH, 10.0 % MC')
    const cooled = warmingWords(warmingAnswer({ fromC: 20, fromHumidityPct: 80, toC: 5 }))
    expect(cooled.figure).not.toMatch(/\d/)
    expect(cooled.words).toContain('condenses')
  })
})
