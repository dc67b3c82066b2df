import { describe, expect, it } from 'vitest'
import { plainText, say, strong, strongTexts } from './sentence'

describe('a sentence in parts', () => {
  it('keeps its words in order and marks the strong ones', () => {
    const sentence = say`You have ${strong('3 notices')} to see${' today'}.`
    expect(plainText(sentence)).toBe('You have 3 notices to see today.')
    expect(strongTexts(sentence)).toEqual(['3 notices'])
  })
  it('takes another sentence in', () => {
    expect(strongTexts(say`${say`${strong('A')} and B`}, then ${strong('C')}`)).toEqual(['A', 'C'])
  })
  it('reads nothing in a name as markup', () => {
    const name = '**<b>${x}</b>**'
    expect(say`${strong(name)}`).toEqual([{ text: name, strong: true }])
    expect(plainText(say`${name}`)).toBe(name)
  })
})
