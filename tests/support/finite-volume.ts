import { transverseDiffusionM2PerS } from '@/lib/carry/diffusion'

/**
 * An independent way to the same answer, for tests: wood cut into fine cells, moisture passed from cell to cell, the
 * diffusion taken afresh in each cell at each step. Slow, and free of the shortcuts that the product takes.
 * Source: implicit finite volumes (Patankar, Numerical Heat Transfer and Fluid Flow, 1980, ch. 4).
 */

export interface Way {
  /** From the open face inwards, m; the far end is closed. */
  readonly depthM: number
  /** How many times as fast as across the grain. */
  readonly ratio: number
}

export interface OracleHour {
  readonly emcPct: number
  readonly temperatureC: number
}

/** What a bare surface passes in still air, m/s: twice as much for every 12 K. Status: derived. */
const surfaceMPerS = (temperatureC: number): number => 2.5e-7 * 2 ** ((temperatureC - 8) / 12)

/** Cells grow inwards, so that the first minutes are caught at the surface. */
function widths(depthM: number, cells: number): number[] {
  const edge = (n: number) => depthM * (1 - Math.cos((Math.PI * n) / (2 * cells)))
  return Array.from({ length: cells }, (_, n) => edge(n + 1) - edge(n))
}

/** One implicit step along a line of cells; `rate` and `open` are conductances per area. */
function stepLine(
  values: Float64Array,
  dx: readonly number[],
  diffusion: (n: number) => number,
  surface: number,
  emcPct: number,
  dtS: number,
): Float64Array {
  const size = values.length
  const lower = new Float64Array(size)
  const main = new Float64Array(size)
  const upper = new Float64Array(size)
  const right = new Float64Array(size)
  for (let n = 0; n < size; n += 1) {
    const own = (dx[n] ?? 0) / dtS
    main[n] = (main[n] ?? 0) + own
    right[n] = own * (values[n] ?? 0)
    if (n + 1 < size) {
      const between = 2 / ((dx[n] ?? 0) / diffusion(n) + (dx[n + 1] ?? 0) / diffusion(n + 1))
      main[n] = (main[n] ?? 0) + between
      main[n + 1] = (main[n + 1] ?? 0) + between
      upper[n] = -between
      lower[n + 1] = -between
    }
  }
  const face = 1 / (1 / surface + (dx[0] ?? 0) / 2 / diffusion(0))
  main[0] = (main[0] ?? 0) + face
  right[0] = (right[0] ?? 0) + face * emcPct
  for (let n = 1; n < size; n += 1) {
    const times = (lower[n] ?? 0) / (main[n - 1] ?? 1)
    main[n] = (main[n] ?? 0) - times * (upper[n - 1] ?? 0)
    right[n] = (right[n] ?? 0) - times * (right[n - 1] ?? 0)
  }
  const next = new Float64Array(size)
  for (let n = size - 1; n >= 0; n -= 1)
    next[n] = ((right[n] ?? 0) - (upper[n] ?? 0) * (next[n + 1] ?? 0)) / (main[n] ?? 1)
  return next
}

export interface Oracle {
  /** Brings the wood on by an hour of air. */
  readonly step: (hour: OracleHour) => void
  readonly meanPct: () => number
}

/**
 * Wood with one way in, or two at right angles (a wall and its rim), evenly moist at first.
 * @param cells across each way; the error falls with its square
 * @param stepsPerHour more for thin wood
 */
export function finiteVolume(
  across: Way,
  along: Way | null,
  densityKgM3: number,
  startPct: number,
  cells = 40,
  stepsPerHour = 6,
): Oracle {
  const dx = widths(across.depthM, cells)
  const dy = along === null ? [1] : widths(along.depthM, cells)
  const grid: Float64Array[] = dy.map(() => new Float64Array(cells).fill(startPct))
  const dtS = 3600 / stepsPerHour
  const step = (hour: OracleHour): void => {
    const surface = surfaceMPerS(hour.temperatureC)
    const diffusionAt = (mcPct: number): number =>
      transverseDiffusionM2PerS(hour.temperatureC, Math.min(30, Math.max(0, mcPct)), densityKgM3)
    for (let n = 0; n < stepsPerHour; n += 1) {
      grid.forEach((row, y) => {
        const held = Float64Array.from(row, diffusionAt)
        grid[y] = stepLine(row, dx, (x) => across.ratio * (held[x] ?? 0), surface, hour.emcPct, dtS)
      })
      if (along === null) continue
      for (let x = 0; x < cells; x += 1) {
        const column = Float64Array.from(grid, (row) => row[x] ?? 0)
        const held = Float64Array.from(column, diffusionAt)
        const next = stepLine(column, dy, (y) => along.ratio * (held[y] ?? 0), surface, hour.emcPct, dtS)
        grid.forEach((row, y) => {
          row[x] = next[y] ?? 0
        })
      }
    }
  }
  const meanPct = (): number => {
    let sum = 0
    let volume = 0
    grid.forEach((row, y) => {
      row.forEach((value, x) => {
        const cell = (dx[x] ?? 0) * (dy[y] ?? 0)
        sum += cell * value
        volume += cell
      })
    })
    return sum / volume
  }
  return { step, meanPct }
}
