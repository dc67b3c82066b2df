import type { WoodKind } from '@/lib/pieces/piece'
import { OTHER_NAMES } from './species-notes'

/** What a wood is found by. */
export type FindableWood = {
  readonly slug: string
  readonly commonName: string
  readonly latinName: string
  /** The site's own stand first among equals. */
  readonly isOwn?: boolean
}

export type WoodsFound<W extends FindableWood> = {
  /** Best first; all of them where nothing but a kind of wood was asked for. */
  readonly woods: readonly W[]
  /** The kind that the words speak of: "burr walnut" and "walnut burl" are wild grain. Undefined for plain wood. */
  readonly suggestedKind: WoodKind | undefined
}

/** Words for wood that isn't plain. Status: common practice, no source. */
const KIND_OF_WORD: ReadonlyMap<string, WoodKind> = new Map<string, WoodKind>([
  ...['burr', 'burrs', 'burl', 'burls', 'burrwood', 'burlwood', 'pippy'].map(
    (word) => [word, 'wild'] as const,
  ),
  ...['crotch', 'crotches', 'curl', 'curls', 'feather', 'flame', 'root', 'stump', 'knot', 'pith'].map(
    (word) => [word, 'wild'] as const,
  ),
  ...['stabilised', 'stabilized'].map((word) => [word, 'stabilised'] as const),
  ...['hybrid'].map((word) => [word, 'hybrid'] as const),
])

/** Words that stand between others and name nothing. */
const FILLERS: ReadonlySet<string> = new Set(['of', 'the', 'from', 'in', 'wood', 'grain'])

/** Lower case, without accents, as single words. */
const wordsOf = (text: string): string[] =>
  text
    .normalize('NFD')
    .replaceAll(/\p{M}/gu, '')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter(Boolean)

/** The kind that the words speak of. A wild cherry has plain grain, so "wild" counts only as "wild grain". */
const kindOf = (words: readonly string[]): WoodKind | undefined =>
  words.includes('wild') && words.includes('grain')
    ? 'wild'
    : words.map((word) => KIND_OF_WORD.get(word)).find((kind) => kind !== undefined)

/** The kind of wood that a name or a query speaks of; undefined for plain wood. */
export const woodKindOfWords = (text: string): WoodKind | undefined => kindOf(wordsOf(text))

/** How well a word answers to a list of words: 0 not at all. */
function fitOf(word: string, names: readonly string[]): 0 | 1 | 2 | 3 {
  if (names.includes(word)) return 3
  if (names.some((name) => name.startsWith(word))) return 2
  return names.some((name) => name.includes(word)) ? 1 : 0
}

type Names = { common: readonly string[]; latin: readonly string[]; other: readonly string[] }

/** The common name counts before the Latin one, and that before the others. */
const bestFit = (word: string, { common, latin, other }: Names): number =>
  Math.max(
    ...(
      [
        [fitOf(word, common), [0, 3, 8, 9]],
        [fitOf(word, latin), [0, 2, 6, 7]],
        [fitOf(word, other), [0, 1, 4, 5]],
      ] as const
    ).map(([fit, ranks]) => ranks[fit]),
  )

/**
 * The woods that a few words ask for, by common name, Latin name, other names, or parts of words; in any order, with
 * accents and capitals left out of account. Each word must be found, but for those that name a kind of wood.
 * @returns the best first: whole words before beginnings before parts, a common name before a Latin one, then the
 *   site's own, then by name; the same for the same words and woods, always
 */
export function findWoods<W extends FindableWood>(query: string, woods: readonly W[]): WoodsFound<W> {
  const asked = wordsOf(query)
  const suggestedKind = kindOf(asked)
  const isOfKind = (word: string) =>
    KIND_OF_WORD.has(word) || (word === 'wild' && suggestedKind === 'wild' && asked.includes('grain'))
  const plain = asked.filter((word) => !isOfKind(word) && !FILLERS.has(word))
  const kinds = asked.filter(isOfKind)
  const ranked = woods.flatMap((wood) => {
    const names: Names = {
      common: wordsOf(wood.commonName),
      latin: wordsOf(wood.latinName),
      other: wordsOf(OTHER_NAMES[wood.slug] ?? ''),
    }
    const fits = plain.map((word) => bestFit(word, names))
    if (fits.includes(0)) return []
    // An own wood may be called "burr elm": then the word counts for it as well.
    const ofKind = kinds.filter((word) => names.common.includes(word)).length
    const leads = plain[0] !== undefined && names.common[0]?.startsWith(plain[0]) === true ? 1 : 0
    return [{ wood, rank: fits.reduce((sum, fit) => sum + 2 * fit, 0) + 20 * ofKind + leads }]
  })
  return {
    woods: ranked.toSorted((a, b) => b.rank - a.rank || inOrder(a.wood, b.wood)).map(({ wood }) => wood),
    suggestedKind,
  }
}

/** The site's own first, then by common name. */
export function inOrder(a: FindableWood, b: FindableWood): number {
  return (
    Number(b.isOwn ?? false) - Number(a.isOwn ?? false) ||
    a.commonName.localeCompare(b.commonName, 'en') ||
    (a.slug < b.slug ? -1 : 1)
  )
}
