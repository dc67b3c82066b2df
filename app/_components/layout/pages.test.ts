import { describe, expect, it } from 'vitest'
import { barPagesFor, isCurrent, pagesFor } from './pages'

const words = (pages: { word: string }[]) => pages.map((page) => page.word)

describe('the pages of a site', () => {
  it('shows an onlooker only the pages that open for one', () => {
    expect(words(pagesFor('onlooker'))).toEqual(['Now', 'Rooms', 'Pieces', 'People and place'])
    expect(words(barPagesFor('onlooker'))).toEqual(['Now', 'Pieces', 'Rooms'])
  })

  it('has a hand reach Carry from the bottom bar', () => {
    expect(words(barPagesFor('hand'))).toEqual(['Now', 'Carry', 'Pieces', 'Rooms'])
  })

  it('marks a page for what lies below it, and Now for itself alone', () => {
    const [now, rooms] = pagesFor('maker')
    if (!now || !rooms) throw new Error('pages are missing')
    expect(isCurrent(rooms, '/sites/a', '/sites/a/rooms/b')).toBe(true)
    expect(isCurrent(rooms, '/sites/a', '/sites/a/roomsx')).toBe(false)
    expect(isCurrent(now, '/sites/a', '/sites/a/rooms')).toBe(false)
    expect(isCurrent(now, '/sites/a', '/sites/a')).toBe(true)
  })
})
