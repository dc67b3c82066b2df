/** When the table below was last gone through; by memory alone, so its age counts. */
export const PROTECTED_CHECKED_ON = '2026-12-01'

/** Stands behind every listing, and where there is none. */
export const PROTECTED_ASK =
  'Ask your national authority before you buy, sell or send it over a border: listings change, and some countries have rules of their own.'

type ProtectedRow = {
  /** A species' slug, or a genus followed by -spp. */
  readonly wood: string
  readonly listing: string
}

/**
 * Woods whose trade is under the Convention on International Trade in Endangered Species (CITES).
 * Status: from memory, nothing was looked up; so each is told with the date and the advice to ask. A wood that is
 * missing here may be listed all the same.
 */
const PROTECTED_TABLE: readonly ProtectedRow[] = [
  { wood: 'dalbergia-nigra', listing: 'CITES Appendix I' },
  { wood: 'dalbergia-spp', listing: 'CITES Appendix II, as all rosewoods of its genus' },
  { wood: 'guibourtia-spp', listing: 'CITES Appendix II for three species, sold as bubinga' },
  { wood: 'pericopsis-elata', listing: 'CITES Appendix II' },
  { wood: 'swietenia-spp', listing: 'CITES Appendix II (big-leaf mahogany: trees from the Americas)' },
  { wood: 'guaiacum-spp', listing: 'CITES Appendix II' },
  { wood: 'khaya-spp', listing: 'CITES Appendix II (trees from Africa)' },
  { wood: 'pterocarpus-spp', listing: 'CITES Appendix II (trees from Africa, and red sanders)' },
  { wood: 'afzelia-spp', listing: 'CITES Appendix II (trees from Africa)' },
  { wood: 'platymiscium-spp', listing: 'CITES Appendix II for one species of the genus' },
  { wood: 'cedrela-spp', listing: 'CITES Appendix II (trees from the Americas)' },
  { wood: 'dipteryx-spp', listing: 'CITES Appendix II' },
  { wood: 'handroanthus-spp', listing: 'CITES Appendix II' },
  { wood: 'tabebuia-spp', listing: 'CITES Appendix II' },
  { wood: 'gonystylus-spp', listing: 'CITES Appendix II' },
  { wood: 'paubrasilia-echinata', listing: 'CITES Appendix II' },
  { wood: 'aniba-rosaeodora', listing: 'CITES Appendix II' },
  { wood: 'araucaria-araucana', listing: 'CITES Appendix I' },
  { wood: 'fitzroya-cupressoides', listing: 'CITES Appendix I' },
]

export type ProtectedNote = {
  /** The listing in words. */
  readonly listing: string
  readonly status: 'from memory'
  /** The day on which it was last gone through. */
  readonly checkedOn: string
  /** Whom to ask; stands beside every listing. */
  readonly ask: string
}

const BY_WOOD: ReadonlyMap<string, string> = new Map(PROTECTED_TABLE.map((row) => [row.wood, row.listing]))

/**
 * Whether a wood's trade is known to be under a protection of its species.
 * @param slug Latin name in lower case with hyphens
 * @returns the species' own listing, else its genus's; undefined where none is remembered, which does not mean free
 *
 * Source: none looked up. Status: from memory, with the date.
 */
export function protectedNote(slug: string): ProtectedNote | undefined {
  const genus = slug.split('-')[0] ?? slug
  const listing = BY_WOOD.get(slug) ?? BY_WOOD.get(`${genus}-spp`)
  return listing === undefined
    ? undefined
    : { listing, status: 'from memory', checkedOn: PROTECTED_CHECKED_ON, ask: PROTECTED_ASK }
}

/** A listing as one caution: what, how far it is known, and whom to ask. */
export const protectedWords = ({ listing, status, checkedOn, ask }: ProtectedNote): string =>
  `Protected wood: ${listing} (${status}, ${checkedOn}). ${ask}`
