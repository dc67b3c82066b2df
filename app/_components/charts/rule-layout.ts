/** A word beside a stem: which side of it, and how high. */
export type LabelPlace = { level: number; side: 'left' | 'right' }
type Label = { x: number; width: number }
type Box = { from: number; to: number; level: number }

const BEAM = 40
const LEVEL_COST = [0, 1, 4]
const OVERLAP_COST = 100
const OUTSIDE_COST = 60
const GAP = 8

/** About how wide a text is, px: letters and figures of Source Sans 3 at 14 px, measured over the labels of a rule. */
export const textWidth = (text: string, isStrong = false): number => text.length * (isStrong ? 6.4 : 6.15) + 4

/**
 * Places the words of flags, beside their stems and on as few levels as it takes, so that no word covers another
 * word or lies under a taller stem. Labels come sorted by `x`; the places come in the same order.
 */
export function placeLabels(labels: readonly Label[], width: number): LabelPlace[] {
  type State = { cost: number; places: LabelPlace[]; boxes: Box[]; stems: { x: number; level: number }[] }
  let states: State[] = [{ cost: 0, places: [], boxes: [], stems: [] }]
  for (const label of labels) {
    const next: State[] = []
    for (const state of states) {
      for (const level of [0, 1, 2]) {
        for (const side of ['right', 'left'] as const) {
          const box: Box = {
            from: side === 'right' ? label.x : label.x - label.width - GAP,
            to: side === 'right' ? label.x + label.width + GAP : label.x,
            level,
          }
          let cost = state.cost + (LEVEL_COST[level] ?? 9) + (side === 'left' ? 0.3 : 0)
          if (box.from < 0 || box.to > width) cost += OUTSIDE_COST
          for (const other of state.boxes) {
            if (other.level === level && overlaps(box, other)) cost += OVERLAP_COST
            // A taller stem runs down through the words of the levels below it.
            if (level > other.level && label.x > other.from && label.x < other.to) cost += OVERLAP_COST
          }
          for (const stem of state.stems) {
            if (stem.level >= level && stem.x > box.from + 1 && stem.x < box.to - 1) cost += OVERLAP_COST
          }
          next.push({
            cost,
            places: [...state.places, { level, side }],
            boxes: [...state.boxes, box],
            stems: [...state.stems, { x: label.x, level }],
          })
        }
      }
    }
    states = next.sort((a, b) => a.cost - b.cost).slice(0, BEAM)
  }
  return states[0]?.places ?? []
}

const overlaps = (a: { from: number; to: number }, b: { from: number; to: number }) =>
  a.from < b.to && b.from < a.to

type Wish = { at: number; size: number }

/**
 * Moves things along a line as little as it takes that none touch, keeping their order and the ends of the line.
 * Wishes come sorted by `at`; the answer gives middles in the same order. When they don't fit, they share the line.
 */
export function spread(wishes: readonly Wish[], min: number, max: number): number[] {
  const total = wishes.reduce((sum, wish) => sum + wish.size, 0)
  const squeeze = total > max - min ? (max - min) / total : 1
  const blocks: SpreadBlock[] = []
  for (const wish of wishes) {
    const size = wish.size * squeeze
    blocks.push({ start: 0, size, wishSum: wish.at - size / 2, count: 1 })
    settle(blocks, min, max)
  }
  const starts = blocks.map((block) => block.start)
  const middles: number[] = []
  let block = 0
  let used = 0
  let offset = 0
  for (const wish of wishes) {
    const size = wish.size * squeeze
    middles.push((starts[block] ?? min) + offset + size / 2)
    offset += size
    used += 1
    if (used === blocks[block]?.count) {
      block += 1
      used = 0
      offset = 0
    }
  }
  return middles
}

type SpreadBlock = { start: number; size: number; wishSum: number; count: number }

/** Joins the last block to the one before while they touch; a joined block stands at the mean of its wishes. */
function settle(blocks: SpreadBlock[], min: number, max: number): void {
  for (;;) {
    const last = blocks.at(-1)
    if (!last) return
    last.start = Math.min(Math.max(last.wishSum / last.count, min), max - last.size)
    const before = blocks.at(-2)
    if (!before || before.start + before.size <= last.start) return
    blocks.pop()
    // Each member wishes for its own start; seen from the block's start that is less by what stands before it.
    before.wishSum += last.wishSum - last.count * before.size
    before.count += last.count
    before.size += last.size
  }
}

/** Breaks a text into at most two lines where the second would otherwise run out of its place. */
export function twoLines(text: string, space: number): string[] {
  if (textWidth(text) <= space) return text === '' ? [] : [text]
  const words = text.split(' ')
  let first = words.shift() ?? ''
  while (words[0] !== undefined && textWidth(`${first} ${words[0]}`) <= space)
    first += ` ${words.shift() ?? ''}`
  return words.length === 0 ? [first] : [first, words.join(' ')]
}
