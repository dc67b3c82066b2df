import type { UnitSystem } from '@/lib/sites/site'
import { movementOfWood } from './movement-class'
import type { Species } from './species'
import { type Wood, woodStatusWords } from './wood'

/** The unit of a movement for each point of % MC: thousandths of the size, whatever the size. */
export const perPointUnit: Readonly<Record<UnitSystem, string>> = { metric: 'mm/m', imperial: 'thou/in' }

/** What the unit means, once on a page that uses it. */
export const perPointWords: Readonly<Record<UnitSystem, string>> = {
  metric: 'Movement is told in mm in a metre (mm/m) for each point; a point is 1\u00a0% MC.',
  imperial:
    'Movement is told in thousandths of an inch in an inch (thou/in) for each point; a point is 1\u00a0% MC.',
}

/** A fraction per % MC as thousandths, to 0.1: "1.7". Millimetres in a metre and thous in an inch are the same figure. */
export const formatPerPointFigure = (perPct: number): string => (perPct * 1000).toFixed(1)

/** A density as read, to 10 kg/m³: more than that no two boards share. */
export const formatDensity = (densityKgM3: number): string =>
  `${String(Math.round(densityKgM3 / 10) * 10)}\u00a0kg/m³`

export interface WoodFigureWords {
  across: string
  along: string
  density: string
  /** Whether the movement is only that of its class, opened for warnings. */
  isMovementAssumed: boolean
  isDensityAssumed: boolean
}

/** What is reckoned with, figure by figure; an assumed one says "about". */
export function woodFigureWords({ reckoned }: Pick<Wood, 'reckoned'>): WoodFigureWords {
  const isMovementAssumed = reckoned.assumed.includes('movement')
  const isDensityAssumed = reckoned.assumed.includes('density')
  const about = (isAssumed: boolean, text: string) => (isAssumed ? `about ${text}` : text)
  return {
    across: about(isMovementAssumed, formatPerPointFigure(reckoned.radialPerPct)),
    along: about(isMovementAssumed, formatPerPointFigure(reckoned.tangentialPerPct)),
    density: about(isDensityAssumed, formatDensity(reckoned.densityKgM3)),
    isMovementAssumed,
    isDensityAssumed,
  }
}

/** What was not known of a wood and is taken as usual, in words; empty when nothing was. */
export function woodAssumedWords(wood: Pick<Wood, 'reckoned' | 'movementClass'>): string {
  const { isMovementAssumed, isDensityAssumed } = woodFigureWords(wood)
  const parts = [
    ...(isMovementAssumed ? [`movement of the ${wood.movementClass} class`] : []),
    ...(isDensityAssumed ? ['a middling density'] : []),
  ]
  return parts.length === 0 ? '' : `Assumed: ${parts.join(' and ')}, so the doubt is wider.`
}

/** How a wood is known, in a few words. */
export const woodKnownWords = (wood: Pick<Wood, 'isOwn' | 'status' | 'reckoned'>): string =>
  wood.isOwn && wood.reckoned.assumed.includes('movement')
    ? 'your own wood, by its class'
    : woodStatusWords[wood.status]

/** Where the figures come from, as one sentence; empty where the status says it already. */
export const woodSourceWords = ({ source, status }: Pick<Wood, 'source' | 'status'>): string =>
  source === '' || source === status ? '' : `Source: ${source}.`

/** The table's own figures, to set one's own against. */
export function tableWords(species: Species, units: UnitSystem): string {
  const { across, along, density } = woodFigureWords({
    reckoned: { ...movementOfWood(species), assumed: [...movementOfWood(species).assumed] },
  })
  const source = woodSourceWords(species)
  return `In the table: ${across} ${perPointUnit[units]} across and ${along} along the rings for each point of % MC, ${density}; ${woodStatusWords[species.status]}.${source && ` ${source}`}`
}

/** The sentence over the page: how many woods there are, and whose figures count. */
export function woodsSentence(woods: readonly Pick<Wood, 'isOwn' | 'isOverridden'>[]): string {
  const own = woods.filter((wood) => wood.isOwn).length
  const overridden = woods.filter((wood) => wood.isOverridden).length
  const known = `${String(woods.length - own)} woods are in the table`
  const yours = own === 0 ? '' : own === 1 ? ', and one more is yours' : `, and ${String(own)} more are yours`
  const figures =
    overridden === 0
      ? own === 0
        ? ': none is yours yet, and all go by the published figures'
        : ''
      : overridden === 1
        ? '; one of the table goes by your own figures'
        : `; ${String(overridden)} of the table go by your own figures`
  return `${known}${yours}${figures}.`
}
