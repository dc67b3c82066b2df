import type { CutMc, PieceFacts } from '@/lib/carry/carry-check'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import type { Followed, Stay } from '@/lib/follow/record'
import { evenState } from '@/lib/follow/wood-state'
import type { FitGrade } from '@/lib/pieces/piece'
import { type Chance, factorNineInTen } from './chance'
import { cutOfWood, evenWood, type TrueBox, type TrueCut, type TrueWood } from './truth-box'

/** One box of the shelf: what the maker told of it, what is true of it, and its wood both ways. */
export interface ShelfBox {
  readonly id: number
  readonly code: string
  readonly facts: PieceFacts
  truth: TrueBox
  trueCut: TrueCut
  readonly wood: TrueWood
  cut: CutMc
  followed: Followed
  stays: Stay[]
  /** When it goes to a buyer and another takes its place, epoch ms. */
  leavesAt: number
  /** The carry that it is planned for or out on. */
  isTaken: boolean
}

interface WoodRow {
  readonly slug: string
  readonly densityKgM3: number
  readonly tangentialPerPct: number
  readonly radialPerPct: number
}

/** Published figures (Wood Handbook, 2010, Tables 4-3 and 13-5; Hoadley, 1998): data, which both models may know. */
const WOODS: readonly [WoodRow, ...WoodRow[]] = [
  { slug: 'fraxinus-americana', densityKgM3: 672, tangentialPerPct: 0.00274, radialPerPct: 0.00169 },
  { slug: 'fraxinus-excelsior', densityKgM3: 702, tangentialPerPct: 0.00282, radialPerPct: 0.00172 },
  { slug: 'fagus-sylvatica', densityKgM3: 720, tangentialPerPct: 0.00427, radialPerPct: 0.00201 },
  { slug: 'acer-saccharum', densityKgM3: 705, tangentialPerPct: 0.00353, radialPerPct: 0.00165 },
  { slug: 'prunus-serotina', densityKgM3: 560, tangentialPerPct: 0.00248, radialPerPct: 0.00126 },
  { slug: 'juglans-nigra', densityKgM3: 610, tangentialPerPct: 0.00274, radialPerPct: 0.0019 },
  { slug: 'quercus-alba', densityKgM3: 762, tangentialPerPct: 0.00365, radialPerPct: 0.0018 },
]

/** What the table of grades states (status guess there): middle of the allowance, mm, with half of it either way. */
type Grade = readonly [FitGrade, number]
const USUAL: readonly [Grade, ...Grade[]] = [
  ['snug', 0.08],
  ['snug', 0.08],
  ['snug', 0.08],
  ['easy', 0.2],
  ['easy', 0.2],
  ['easy', 0.2],
  ['easy', 0.2],
  ['loose', 0.4],
]
/** Fits that only a small joint along the grain can keep at all. */
const CLOSE: readonly [Grade, ...Grade[]] = [...USUAL, ['snap', 0.05], ['suction', 0.03]]
const SMALL_MM = 55

const FILMS = { '': null, wax: null, oil: 7e-8, lacquer: 1.6e-8 } as const
const MM_LEAST = 0.3

/** About, within a share either way eight times in ten. */
const about = (chance: Chance, middle: number, share: number): number => {
  for (;;) {
    const value = middle * (1 + (share / 1.2816) * chance.normal())
    if (value > 0.2 * middle) return value
  }
}

const rounded = (value: number, step: number): number => Math.round(value / step) * step

/** How the maker knows the fit: by hand as a grade, or by an allowance that was measured. */
function fitOf(
  chance: Chance,
  grades: readonly [Grade, ...Grade[]],
): Pick<PieceFacts, 'fitGrade' | 'allowanceMm'> & { trueMm: number } {
  if (chance.happens(0.15)) {
    const allowanceMm = rounded(chance.between(0.08, 0.3), 0.01)
    return { fitGrade: null, allowanceMm, trueMm: allowanceMm * factorNineInTen(chance, 1.4) }
  }
  const [fitGrade, middleMm] = chance.pick(grades)
  return { fitGrade, allowanceMm: null, trueMm: about(chance, middleMm, 0.5) }
}

interface Drawn {
  facts: PieceFacts
  truth: TrueBox
}

/** A box as it comes from the lathe, with everything that nobody can see drawn from the spreads that are stated. */
export function drawnBox(chance: Chance, number: string): Drawn {
  const wood = chance.pick(WOODS)
  const isTold = chance.happens(0.9)
  const isEndGrain = chance.happens(0.85)
  const diameterMm = rounded(chance.between(32, 92), 1)
  const fit = fitOf(chance, isEndGrain && diameterMm < SMALL_MM ? CLOSE : USUAL)
  const wallMm = rounded(chance.between(2, 4.2), 0.1)
  const spigotMm = rounded(chance.between(4, 8), 0.5)
  const lidMm = rounded(chance.between(6, 11), 0.5)
  const isPlug = chance.happens(0.65)
  const isRingInside = chance.happens(0.7)
  const finish = chance.pick(['', 'wax', 'oil', 'oil', 'lacquer'] as const)
  const film = FILMS[finish]
  const movement = factorNineInTen(chance, 1.25)
  const density = wood.densityKgM3 * (1 + 0.04 * chance.normal())
  const sizeTold = chance.happens(0.7)
  const measured = (mm: number): number => Math.max(MM_LEAST, mm * (1 + 0.05 * chance.normal()))
  const trueWallMm = measured(sizeTold ? wallMm : chance.between(2, 3.4))
  const trueSpigotMm = measured(sizeTold ? spigotMm : 6)
  const facts: PieceFacts = {
    number,
    stage: 'box',
    wood: isTold ? wood.slug : null,
    woodKind: 'plain',
    grain: isEndGrain ? 'end-grain' : 'side-grain',
    spigotOn: isRingInside ? 'base' : 'lid',
    lidForm: isPlug ? 'plug' : 'hollow',
    jointDiameterMm: diameterMm,
    wallMm: sizeTold ? wallMm : null,
    spigotMm: sizeTold ? spigotMm : null,
    lidMm: sizeTold ? lidMm : null,
    lidWallMm: null,
    bodyWallMm: null,
    blankDiameterMm: null,
    endsSealed: false,
    finish,
    fitGrade: fit.fitGrade,
    clearanceMm: null,
    allowanceMm: fit.allowanceMm,
  }
  const ringShape = { wallMm: trueWallMm, isWallAlongGrain: !isEndGrain, lengthMm: trueSpigotMm }
  const plug = { wallMm: measured(sizeTold ? lidMm : 8), isWallAlongGrain: isEndGrain, lengthMm: null }
  return {
    facts,
    truth: {
      stuff: {
        // Falls with density as the published figures do; a factor of two either way.
        acrossM2PerS: 2.9e-11 * Math.exp((640 - density) / 330) * factorNineInTen(chance, 2),
        // From 3 to 50 nine times in ten.
        alongRatio: Math.min(60, Math.max(2.5, 12.2 * factorNineInTen(chance, 4.08))),
        surfaceFactor: Math.exp(0.35 * chance.normal()),
        filmMPerS: film === null ? null : film * chance.between(1, 3),
      },
      ringShape,
      lidShape: isPlug ? plug : { ...ringShape, wallMm: measured(trueWallMm) },
      diameterMm,
      mostPerPct: wood.tangentialPerPct * movement,
      // Along the grain next to nothing moves.
      leastPerPct: isEndGrain ? wood.radialPerPct * movement : 0.00005,
      isRingInside,
      allowanceMm: fit.trueMm,
      bagPerH: 0.0016 * factorNineInTen(chance, 3),
    },
  }
}

/** How well the maker knows at what moisture a rested blank was cut, ± % MC: as the product has it for wood it followed. */
const CUT_DOUBT_PCT = 0.5

/**
 * A box cut from a blank that had rested until it matched the cupboard.
 * @param truePct what the cupboard's wood has come to in truth; `toldPct` what the record says of it
 */
export function shelfBox(
  chance: Chance,
  id: number,
  made: { number: string; atMs: number; truePct: number; toldPct: number; cupboardId: number },
): ShelfBox {
  const { facts, truth } = drawnBox(chance, made.number)
  const state = evenState(woodOfPiece(facts).filter, made.toldPct, 'closed', 0)
  return {
    id,
    code: `box-${made.number}`,
    facts,
    truth,
    trueCut: { ringPct: made.truePct, lidPct: made.truePct },
    wood: evenWood(truth, made.atMs, made.truePct),
    cut: { ringMcPct: made.toldPct, lidMcPct: made.toldPct, doubtPct: CUT_DOUBT_PCT },
    followed: { atMs: made.atMs, state, outAtMs: null, outState: null },
    stays: [{ roomId: made.cupboardId, fromAt: new Date(made.atMs), toAt: null, cover: 'closed' }],
    leavesAt: made.atMs + chance.between(50, 150) * 86_400_000,
    isTaken: false,
  }
}

/**
 * A lid that no longer fits is trued anew where it stands: the joint counts from what its wood is now.
 * The maker judges the new fit by hand as the old one.
 */
export function retrued(chance: Chance, box: ShelfBox): void {
  box.trueCut = cutOfWood(box.wood)
  const { fitGrade, allowanceMm } = box.facts
  const middleMm = allowanceMm ?? CLOSE.find(([grade]) => grade === fitGrade)?.[1]
  if (middleMm !== undefined)
    box.truth = { ...box.truth, allowanceMm: about(chance, middleMm, fitGrade === null ? 0.3 : 0.5) }
  const { ringPct, lidPct } = box.followed.state
  box.cut = { ringMcPct: ringPct, lidMcPct: lidPct, doubtPct: CUT_DOUBT_PCT }
}
