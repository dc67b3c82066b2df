import { axisOf } from '@/app/_components/charts/series-model'
import { spread } from '@/app/_components/charts/rule-layout'
import type { RoomFelt } from '@/lib/rooms/felt'

/** What a course of felt EMC is drawn from: plain numbers, no pixels. */

export type FeltDot = { at: number; value: number }
export type FeltGap = { from: number; to: number }
export type FeltLine = {
  thicknessMm: number
  isFocus: boolean
  /** Stretches in which the room was heard; a line is never drawn across a gap. */
  stretches: FeltDot[][]
  /** The middle 8 in 10, through the gaps as well: there it widens. */
  low: FeltDot[]
  high: FeltDot[]
  last: number | null
}
export type FeltFigure = {
  fromAt: number
  toAt: number
  axis: { domain: [number, number]; ticks: number[] }
  air: FeltDot[][]
  gaps: FeltGap[]
  lines: FeltLine[]
}

/** The thickness in focus: one's own, else the middle one. */
export const focusOf = (thicknessesMm: readonly number[], ownMm: number | null): number | undefined =>
  ownMm !== null && thicknessesMm.includes(ownMm)
    ? ownMm
    : thicknessesMm[Math.floor((thicknessesMm.length - 1) / 2)]

/** @returns undefined where there is nothing to draw */
export function feltFigure({ course }: RoomFelt, ownMm: number | null): FeltFigure | undefined {
  const at = course.at.map((text) => new Date(text).getTime())
  const [fromAt] = at
  const toAt = at.at(-1)
  const isEmpty = course.felt.every((one) => one.mcPct.every((value) => value === null))
  if (fromAt === undefined || toAt === undefined || isEmpty) return undefined
  const heard = course.emcPct.map((value) => value !== null)
  const focus = focusOf(
    course.felt.map((one) => one.thicknessMm),
    ownMm,
  )
  const lines = course.felt.map((one): FeltLine => {
    const side = (sign: 1 | -1) =>
      at.flatMap((moment, n) => {
        const value = one.mcPct[n] ?? null
        const doubt = one.doubtPct[n] ?? null
        return value === null || doubt === null ? [] : [{ at: moment, value: value + sign * doubt }]
      })
    return {
      thicknessMm: one.thicknessMm,
      isFocus: one.thicknessMm === focus,
      stretches: stretchesOf(
        at,
        one.mcPct.map((value, n) => (heard[n] === true ? value : null)),
      ),
      low: side(-1),
      high: side(1),
      last: one.mcPct.at(-1) ?? null,
    }
  })
  const focused = lines.filter((line) => line.isFocus)
  return {
    fromAt,
    toAt,
    axis: axisOf(
      [
        ...course.emcPct,
        ...course.felt.flatMap((one) => one.mcPct),
        ...focused.flatMap((line) => [...line.low, ...line.high].map((dot) => dot.value)),
      ],
      2,
    ),
    air: stretchesOf(at, course.emcPct),
    gaps: gapsOf(at, heard),
    lines,
  }
}

function stretchesOf(at: readonly number[], values: readonly (number | null)[]): FeltDot[][] {
  const stretches: FeltDot[][] = []
  let open: FeltDot[] | undefined
  at.forEach((moment, n) => {
    const value = values[n] ?? null
    if (value === null) open = undefined
    else if (open === undefined) stretches.push((open = [{ at: moment, value }]))
    else open.push({ at: moment, value })
  })
  return stretches
}

/** From the last point that was heard to the next one that is. */
function gapsOf(at: readonly number[], heard: readonly boolean[]): FeltGap[] {
  const gaps: FeltGap[] = []
  at.forEach((moment, n) => {
    if (heard[n] === true) return
    const from = at[n - 1] ?? moment
    const to = at[n + 1] ?? moment
    const open = gaps.at(-1)
    if (open !== undefined && open.to >= moment) open.to = to
    else if (to > from) gaps.push({ from, to })
  })
  return gaps
}

/** Where the words of lines that end near one another stand, px, in the order of the ends given. */
export function endLabels(endsPx: readonly number[], topPx: number, bottomPx: number): number[] {
  const order = endsPx.map((at, n) => ({ at, n })).toSorted((a, b) => a.at - b.at)
  const middles = spread(
    order.map(({ at }) => ({ at, size: 18 })),
    topPx,
    bottomPx,
  )
  const placed = new Array<number>(endsPx.length).fill(0)
  order.forEach(({ n, at }, place) => {
    placed[n] = middles[place] ?? at
  })
  return placed
}
