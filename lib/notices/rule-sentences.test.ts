import { describe, expect, it } from 'vitest'
import { plainText } from '@/lib/format/sentence'
import { noticesHeadline as headlineParts } from './rule-sentences'

const noticesHeadline = (...of: Parameters<typeof headlineParts>) => plainText(headlineParts(...of))

describe('the sentence over the notices', () => {
  const notice = (title: string, urgency: 'now' | 'soon' | 'whenever', isSeen = false) => ({
    title,
    urgency,
    isSeen,
    acknowledgedAt: null,
  })
  it('puts what is to be done now first, however old', () => {
    expect(
      noticesHeadline([notice('A sensor is silent.', 'whenever'), notice('Bring 207 in.', 'now')], false),
    ).toBe('You have 2 notices you haven’t seen; the one that matters first is Bring 207 in.')
  })
  it('does not count what somebody has in hand', () => {
    const inHand = { ...notice('Bring 207 in.', 'now'), acknowledgedAt: '2026-03-05T13:00:00Z' }
    expect(noticesHeadline([inHand], false)).toBe('You have seen everything that you were told.')
  })
  it('says when all is seen, and when there was nothing', () => {
    expect(noticesHeadline([notice('x', 'now', true)], false)).toBe(
      'You have seen everything that you were told.',
    )
    expect(noticesHeadline([], false)).toContain('nothing yet')
  })
  it('does not count what it has not fetched', () => {
    expect(noticesHeadline([notice('x', 'soon')], true)).toContain('at least 1 notice')
  })
})
