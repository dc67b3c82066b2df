import { capital } from '@/lib/format/capital'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { CurvePoint } from './clearance-curve'
import { TIGHT_BELOW_MM } from './feel'

type Run = { readonly state: 'free' | 'tight' | 'binds'; readonly fromDeg: number; readonly toDeg: number }

function stateOf(middleMm: number): Run['state'] {
  if (middleMm < 0) return 'binds'
  return middleMm < TIGHT_BELOW_MM ? 'tight' : 'free'
}

/** Stretches of a quarter turn in which a lid is free, tight or may bind. */
function runsOf(curve: readonly CurvePoint[]): readonly Run[] {
  const runs: Run[] = []
  for (const { angleDeg, middleMm } of curve) {
    const state = stateOf(middleMm)
    const last = runs.at(-1)
    if (last?.state === state) runs[runs.length - 1] = { ...last, toDeg: angleDeg }
    else runs.push({ state, fromDeg: angleDeg, toDeg: angleDeg })
  }
  return runs
}

/** An angle as a hand can tell it: to 5 degrees. */
const about = (angleDeg: number): string => `about ${String(Math.round(angleDeg / 5) * 5)}°`

const stateWords: Readonly<Record<Run['state'], string>> = { free: 'free', tight: 'tight', binds: 'may bind' }

/** Within this of either end an angle is told by its name, degrees: 5 degrees rounded would give the end itself. */
const END_DEG = 2.5

/**
 * How the lid goes round a quarter turn, in a sentence without its full stop.
 * @param curve from 0 to 90 degrees
 * @returns in parts, the strong ones where it may bind: "Free to about 25°, tight from there, **may bind past about 40°**"
 */
export function turnHeadline(curve: readonly CurvePoint[]): readonly TextPart[] {
  const runs = runsOf(curve)
  const [first] = runs
  if (first === undefined) return []
  const parts =
    runs.length === 1
      ? [emphasis(first.state, wholeTurn[first.state])]
      : runs.flatMap((run, index) => {
          const words = runWords(run, index, runs.length)
          const part = emphasis(run.state, index === 0 ? capital(words) : words)
          return index === 0 ? part : say`, ${part}`
        })
  return [...parts, ...doubtWords(curve, runs)].flat()
}

const wholeTurn: Readonly<Record<Run['state'], string>> = {
  free: 'Free all the way round',
  tight: 'Tight all the way round, and turns',
  binds: 'May bind however it is turned',
}

const emphasis = (state: Run['state'], text: string): TextPart =>
  state === 'binds' ? strong(text) : { text, strong: false }

function runWords(run: Run, index: number, count: number): string {
  const state = stateWords[run.state]
  if (index === 0) {
    return run.toDeg < END_DEG ? `${state} with the grain lined up` : `${state} to ${about(run.toDeg)}`
  }
  if (index < count - 1) return `${state} from there`
  if (90 - run.fromDeg < END_DEG) return `${state} at a quarter turn`
  return run.state === 'binds' || count > 2 ? `${state} past ${about(run.fromDeg)}` : `${state} from there`
}

/** Where the middle turns but 1 in 10 like it would not. */
function doubtWords(curve: readonly CurvePoint[], runs: readonly Run[]): TextPart[] {
  if (runs.some((run) => run.state === 'binds')) return []
  const binding = curve.filter((point) => point.lowMm < 0)
  const [first] = binding
  if (first === undefined) return []
  const isLastStretch = binding.at(-1)?.angleDeg === curve.at(-1)?.angleDeg
  const where =
    binding.length === curve.length || !isLastStretch
      ? ''
      : 90 - first.angleDeg < END_DEG
        ? ' at a quarter turn'
        : ` past ${about(first.angleDeg)}`
  return say`; ${strong(`1 in 10 like it may bind${where}`)}`
}
