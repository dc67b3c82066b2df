import type { Outline } from '../ui/piece-outline'

/** What hangs from the top edge: a room at its EMC, or a figure of one room. */
export type RuleFlag = {
  id: string
  name: string
  /** "13.6 % MC", or "16.1 % MC at 03:40" when it is not from now. */
  value: string
  emcPct: number
  mark: number
  /** Heart: the one in focus. Soft: not from now. */
  tone: 'ink' | 'heart' | 'soft'
  /** Half the width of a dashed line of doubt, in points; only where the value is not from now. */
  doubtPct?: number
}

/** A thin bar behind a flag: the year of a room. */
export type RuleBand = { lowPct: number; highPct: number; label: string }

/** How far a piece may move from where its joint was cut. */
export type RuleBracket = {
  id: string
  lowPct: number
  highPct: number
  cutPct?: number
  atPct: number
  /** Where the stroke for what is left ends; none when the piece is not out. */
  leftToPct?: number
  label: string
}

/** What stands on the shelf line below. */
export type RuleShelfItem = {
  id: string
  mcPct: number
  label: string
  sub: string
  outline: Outline
  isOut: boolean
  count: number
}

/** A dashed line down from a room: where wood left there would end, given time. */
export type RuleDrop = { emcPct: number; strong: string; soft: string }

export type RuleModel = {
  flags: readonly RuleFlag[]
  bands: readonly RuleBand[]
  brackets: readonly RuleBracket[]
  shelf: readonly RuleShelfItem[]
  drop?: RuleDrop
  /** The figure's name for assistive technology: one sentence. */
  sentence: string
}

/** The scale shown when nothing is known yet: a heated room to a damp shop, % MC. */
const EMPTY: readonly [number, number] = [7, 17]
const LEAST_SPAN = 8

/** The stretch of scale that holds everything with room for its words, in whole % MC. */
export function ruleDomain(
  model: Pick<RuleModel, 'flags' | 'bands' | 'brackets' | 'shelf'>,
): [number, number] {
  const values = [
    ...model.flags.map((flag) => flag.emcPct),
    ...model.bands.flatMap((band) => [band.lowPct, band.highPct]),
    ...model.brackets.map((bracket) => bracket.atPct),
    ...model.shelf.map((item) => item.mcPct),
  ]
  if (values.length === 0) return [...EMPTY]
  let low = Math.floor(Math.min(...values) - 0.6)
  let high = Math.ceil(Math.max(...values) + 0.6)
  while (high - low < LEAST_SPAN) {
    if (high < EMPTY[1] || low <= 0) high += 1
    else low -= 1
  }
  return [Math.max(0, low), Math.min(34, high)]
}
