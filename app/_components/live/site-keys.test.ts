import { describe, expect, it } from 'vitest'
import { areasOf, isLiveKind, siteKey } from './site-keys'

describe('what a change has fetched again', () => {
  it('shows a reading on Now, in its room and in a carry check', () => {
    expect(areasOf.reading).toEqual(expect.arrayContaining(['now', 'rooms', 'carries', 'sensors']))
  })

  it('fetches verdicts, and what wood has felt of a room, again when the figures of a wood change', () => {
    expect(areasOf.wood).toEqual(expect.arrayContaining(['woods', 'now', 'carries', 'pieces', 'rooms']))
  })

  it('knows its own kinds and nothing that an object happens to have', () => {
    expect(isLiveKind('carry')).toBe(true)
    expect(isLiveKind('toString')).toBe(false)
    expect(isLiveKind(undefined)).toBe(false)
  })

  it('files each site apart', () => {
    expect(siteKey('a', 'now')).not.toEqual(siteKey('b', 'now'))
  })
})
