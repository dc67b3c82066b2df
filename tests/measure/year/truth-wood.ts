/**
 * The true wood: each part of a joint cut into cells in two directions, water passed from cell to cell by implicit finite
 * volumes, diffusion taken afresh in each cell at each step. Shares no code with the product; finer, and slower.
 * Source: Patankar, Numerical Heat Transfer and Fluid Flow (1980), ch. 4; one direction after the other in each step.
 */

export interface TrueStuff {
  /** Across the grain at 20 °C and 10 % MC, m²/s. */
  readonly acrossM2PerS: number
  /** Along the grain over across it, at 10 % MC. */
  readonly alongRatio: number
  /** On what a bare surface passes. */
  readonly surfaceFactor: number
  /** What the finish outside passes, m/s; null: bare. */
  readonly filmMPerS: number | null
}

/** How much of a surface is open to the air, 0 to 1: outer face, inner face, end-grain rim. */
export interface Opening {
  readonly outer: number
  readonly inner: number
  readonly rim: number
}

export type TrueCover = 'open' | 'lid-on' | 'closed' | 'bagged'

/** No lid shuts a box quite. Status: guess. */
export const OPENING: Readonly<Record<TrueCover, Opening>> = {
  open: { outer: 1, inner: 1, rim: 1 },
  'lid-on': { outer: 1, inner: 0.05, rim: 1 },
  closed: { outer: 1, inner: 0.05, rim: 0.1 },
  bagged: { outer: 1, inner: 0.05, rim: 0.1 },
}

export interface TrueShape {
  /** From the outer face to the inner one, mm; whether the grain runs that way. */
  readonly wallMm: number
  readonly isWallAlongGrain: boolean
  /** From the rim to the root, mm; null: the way in through the wall is all there is. */
  readonly lengthMm: number | null
}

export interface TruePart {
  readonly shape: TrueShape
  readonly dx: Float64Array
  readonly dy: Float64Array
  /** % MC, row after row. */
  readonly cells: Float64Array
}

/** Drying manuals' order of magnitude, and how steeply it rises; from memory. */
const ACTIVATION_J_PER_MOL = 36_000
const PER_PCT = 0.12
/** The ratio along the grain falls as wood gets damper. Source: Langrish and Walker (1993), at second hand; a mild version. */
const RATIO_FALL_PER_PCT = 0.05
/** A bare surface in still air passes twice as much for every 12 K. Status: derived. */
const surfaceMPerS = (temperatureC: number): number => 2.5e-7 * 2 ** ((temperatureC - 8) / 12)

/** Cells that are thin at both faces, or at the first only. */
function widths(depthMm: number, count: number, isOpenAtBothEnds: boolean): Float64Array {
  const edge = (n: number): number =>
    isOpenAtBothEnds ? (1 - Math.cos((Math.PI * n) / count)) / 2 : 1 - Math.cos((Math.PI * n) / (2 * count))
  return Float64Array.from({ length: count }, (_, n) => ((edge(n + 1) - edge(n)) * depthMm) / 1000)
}

export function truePart(shape: TrueShape, mcPct: number, fineness = 1): TruePart {
  const dx = widths(shape.wallMm, Math.round(10 * fineness), true)
  const dy =
    shape.lengthMm === null ? Float64Array.of(1) : widths(shape.lengthMm, Math.round(8 * fineness), false)
  return { shape, dx, dy, cells: new Float64Array(dx.length * dy.length).fill(mcPct) }
}

export const copyPart = (part: TruePart): TruePart => ({ ...part, cells: part.cells.slice() })

export function meanOfPart({ dx, dy, cells }: TruePart): number {
  let sum = 0
  let area = 0
  for (let y = 0; y < dy.length; y += 1)
    for (let x = 0; x < dx.length; x += 1) {
      const cell = (dx[x] ?? 0) * (dy[y] ?? 0)
      sum += cell * (cells[y * dx.length + x] ?? 0)
      area += cell
    }
  return sum / area
}

/** Scratch for one step: diffusion of each cell both ways, m²/s, and one line's equations. No part has more cells. */
const CELLS_MAX = 4096
const acrossWall = new Float64Array(CELLS_MAX)
const alongLength = new Float64Array(CELLS_MAX)
const lower = new Float64Array(CELLS_MAX)
const main = new Float64Array(CELLS_MAX)
const right = new Float64Array(CELLS_MAX)

interface Line {
  readonly first: number
  readonly stride: number
  readonly width: Float64Array
  readonly diffusion: Float64Array
  /** What the two ends pass, m/s; 0 where nothing. */
  readonly near: number
  readonly far: number
}

/** One implicit step along a line of cells between two surfaces. */
function stepLine(cells: Float64Array, line: Line, emcPct: number, dtS: number): void {
  const { first, stride, width, diffusion, near, far } = line
  const last = width.length - 1
  let place = first
  let before = (width[0] ?? 0) / (diffusion[place] ?? 1)
  main[0] = (width[0] ?? 0) / dtS
  right[0] = (main[0] ?? 0) * (cells[place] ?? 0)
  if (near > 0) {
    const face = 1 / (1 / near + before / 2)
    main[0] = (main[0] ?? 0) + face
    right[0] = (right[0] ?? 0) + face * emcPct
  }
  for (let n = 1; n <= last; n += 1) {
    place += stride
    const own = (width[n] ?? 0) / dtS
    const here = (width[n] ?? 0) / (diffusion[place] ?? 1)
    const between = 2 / (before + here)
    main[n - 1] = (main[n - 1] ?? 0) + between
    main[n] = own + between
    right[n] = own * (cells[place] ?? 0)
    lower[n] = -between
    before = here
  }
  if (far > 0) {
    const face = 1 / (1 / far + before / 2)
    main[last] = (main[last] ?? 0) + face
    right[last] = (right[last] ?? 0) + face * emcPct
  }
  for (let n = 1; n <= last; n += 1) {
    const times = (lower[n] ?? 0) / (main[n - 1] ?? 1)
    main[n] = (main[n] ?? 0) - times * (lower[n] ?? 0)
    right[n] = (right[n] ?? 0) - times * (right[n - 1] ?? 0)
  }
  let after = (right[last] ?? 0) / (main[last] ?? 1)
  cells[place] = after
  for (let n = last - 1; n >= 0; n -= 1) {
    place -= stride
    after = ((right[n] ?? 0) - (lower[n + 1] ?? 0) * after) / (main[n] ?? 1)
    cells[place] = after
  }
}

/** Brings a part forward through air that holds still, in place. */
export function stepPart(
  part: TruePart,
  stuff: TrueStuff,
  opening: Opening,
  air: { readonly emcPct: number; readonly temperatureC: number },
  hours: number,
): void {
  const { shape, dx, dy, cells } = part
  const dtS = 3600 * hours
  const warm = Math.exp((-ACTIVATION_J_PER_MOL / 8.314) * (1 / (air.temperatureC + 273.15) - 1 / 293.15))
  const acrossAt10 = stuff.acrossM2PerS * warm
  const [acrossGrain, alongGrain] = shape.isWallAlongGrain
    ? [alongLength, acrossWall]
    : [acrossWall, alongLength]
  for (let n = 0; n < cells.length; n += 1) {
    const from10 = Math.min(28, Math.max(0, cells[n] ?? 0)) - 10
    const across = acrossAt10 * Math.exp(PER_PCT * from10)
    acrossGrain[n] = across
    // The exponential of the fall, to second order: between 4 and 20 % MC it is within 2 % of it.
    const fall = -RATIO_FALL_PER_PCT * from10
    alongGrain[n] = across * Math.max(1.5, stuff.alongRatio * (1 + fall + (fall * fall) / 2))
  }
  const bare = stuff.surfaceFactor * surfaceMPerS(air.temperatureC)
  const outside = stuff.filmMPerS === null ? bare : 1 / (1 / bare + 1 / stuff.filmMPerS)
  const near = opening.outer * outside
  const far = opening.inner * bare
  for (let y = 0; y < dy.length; y += 1)
    stepLine(
      cells,
      { first: y * dx.length, stride: 1, width: dx, diffusion: acrossWall, near, far },
      air.emcPct,
      dtS,
    )
  if (shape.lengthMm === null) return
  const rim = opening.rim * bare
  for (let x = 0; x < dx.length; x += 1)
    stepLine(
      cells,
      { first: x, stride: dx.length, width: dy, diffusion: alongLength, near: rim, far: 0 },
      air.emcPct,
      dtS,
    )
}
