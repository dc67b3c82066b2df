import { describe, expect, it } from 'vitest'
import { plainText } from '@/lib/format/sentence'
import { placeSentence as sentenceParts } from './place-sentence'

const placeSentence = (...of: Parameters<typeof sentenceParts>) => plainText(sentenceParts(...of))
const members = (['owner', 'maker', 'hand', 'onlooker'] as const).map((role) => ({ role }))

describe('the sentence over People and place', () => {
  it('counts who is there, who can change things, and who is still to come', () => {
    expect(placeSentence('The Yard', members, [{}])).toBe(
      'Four people share The Yard; two of them can change things, and one invitation is waiting.',
    )
    expect(placeSentence('The Yard', members, [{}, {}])).toContain('and two invitations are waiting')
    expect(placeSentence('The Yard', members, [])).not.toContain('invitation')
  })
  it('says so when one is alone', () => {
    expect(placeSentence('The Yard', [{ role: 'owner' }], undefined)).toBe('You have The Yard to yourself.')
  })
  it('tells an onlooker nothing of the members', () => {
    expect(placeSentence('The Yard', undefined, undefined)).toBe('The Yard is shared with you.')
  })
})
