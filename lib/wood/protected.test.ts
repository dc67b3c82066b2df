import { describe, expect, it } from 'vitest'
import { protectedNote, protectedWords } from './protected'
import { SPECIES } from './species'

describe('protected woods', () => {
  it.each([
    'dalbergia-nigra',
    'dalbergia-latifolia',
    'dalbergia-retusa',
    'dalbergia-melanoxylon',
    'guibourtia-spp',
    'pericopsis-elata',
    'swietenia-macrophylla',
    'guaiacum-officinale',
    'khaya-spp',
  ])('%s is marked, by its own row or its genus', (slug) => {
    expect(protectedNote(slug)?.listing).toMatch(/^CITES Appendix II?\b/)
  })

  it('keeps the stricter listing of a species before that of its genus', () => {
    expect(protectedNote('dalbergia-nigra')?.listing).toBe('CITES Appendix I')
    expect(protectedNote('dalbergia-cearensis')?.listing).toMatch(/Appendix II/)
  })

  it('leaves the common woods of a northern shop alone', () => {
    for (const slug of ['fraxinus-excelsior', 'acer-pseudoplatanus', 'juglans-nigra', 'taxus-baccata'])
      expect(protectedNote(slug), slug).toBeUndefined()
  })

  it('never tells a listing without its standing, its date and whom to ask', () => {
    const marked = SPECIES.flatMap((species) => protectedNote(species.slug) ?? [])
    expect(marked.length).toBeGreaterThan(10)
    for (const note of marked)
      expect(protectedWords(note)).toMatch(/\(from memory, 2026-12-01\)\. Ask your national authority/)
  })
})
