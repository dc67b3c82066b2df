import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import type { Cause, HangsOn } from './carry-answer'
import type { Reckoned } from './reckon'
import { type UsedQuestion, usedSpread } from './used-doubt'

/** Beyond so many times the early edge a run is not looked at, unless two causes both move it further than that. */
const LOOKED_AT = 4
/** A cause that moves the edge by less than this share of it is not worth asking for. Status: guess. */
const WORTH_ASKING = 0.05

/** The question with one cause known exactly. */
function without(one: Reckoned, cause: Cause, question: UsedQuestion): UsedQuestion {
  const { spreads } = question
  const { doubt, sizesLogSpread: sizes, paceLogSpread: pace } = one
  const ofPace = (left: number) => ({ ...question, paceShare: pace === 0 ? 0 : left / pace })
  switch (cause) {
    case 'pace':
      return ofPace(sizes)
    case 'sizes':
      return ofPace(Math.sqrt(Math.max(0, pace * pace - sizes * sizes)))
    case 'movement':
      return { ...question, spreads: { ...spreads, movementLog: 0 } }
    case 'allowance':
      return { ...question, spreads: { ...spreads, allowanceLog: 0 } }
    case 'air':
      return { ...question, spreads: { ...spreads, airPct: 0 } }
    case 'cut':
      return { ...question, spreads: { ...spreads, startPct: doubt.startPct / EDGE_OF_EIGHT_IN_TEN } }
    case 'before':
      return { ...question, spreads: { ...spreads, startPct: doubt.cutPct / EDGE_OF_EIGHT_IN_TEN } }
  }
}

/** The causes that are in doubt at all. */
function causesOf({ question: { spreads }, doubt, sizesLogSpread, paceLogSpread }: Reckoned): Cause[] {
  const isOpen: Readonly<Record<Cause, boolean>> = {
    allowance: spreads.allowanceLog > 0,
    sizes: sizesLogSpread > 0,
    cut: doubt.cutPct > 0,
    before: doubt.startPct > 0,
    air: spreads.airPct > 0,
    movement: spreads.movementLog > 0,
    pace: paceLogSpread > sizesLogSpread,
  }
  return CAUSE_ORDER.filter((cause) => isOpen[cause])
}

/** What is soonest told stands first: it goes before another that moves the edge as far. */
const CAUSE_ORDER = ['allowance', 'sizes', 'cut', 'before', 'air', 'movement', 'pace'] as const

/** The first moments of a run, as far as so many hours. */
function cutShort(question: UsedQuestion, hours: number): UsedQuestion {
  const { run } = question
  const moments = run.hours.findIndex((hour) => hour > hours) + 1
  if (moments === 0) return question
  const first = (of: { readonly ring: Float64Array; readonly lid: Float64Array }) => ({
    ring: of.ring.subarray(0, moments),
    lid: of.lid.subarray(0, moments),
  })
  return {
    ...question,
    run: {
      hours: run.hours.subarray(0, moments),
      slow: first(run.slow),
      middle: first(run.middle),
      fast: first(run.fast),
      perPoint: first(run.perPoint),
      leak: run.leak === null ? null : { tight: first(run.leak.tight), leaky: first(run.leak.leaky) },
    },
  }
}

/** Hours to the early edge, were a cause known exactly; Infinity beyond what is looked at. */
export function edgeWithout(one: Reckoned, cause: Cause, question: UsedQuestion = one.question): number {
  return usedSpread(without(one, cause, question)).early(1) ?? Infinity
}

/**
 * The cause whose knowledge would move the early edge most, and what to tell us of it.
 * @returns null where the edge never comes, the fit is gone already, or nothing would move the edge by more than a
 *   twentieth of itself
 *
 * Each cause is switched off by itself, with the same draws. Status: derived.
 */
export function hangsOn(one: Reckoned): HangsOn | null {
  const early = one.spread.early(1)
  if (early === undefined || early === 0 || one.atStartMm >= one.question.allowanceMm) return null
  const causes = causesOf(one)
  const near = cutShort(one.question, LOOKED_AT * early)
  const edges = causes.map((cause) => ({ cause, hours: edgeWithout(one, cause, near) }))
  const beyond = edges.filter(({ hours }) => hours === Infinity)
  const ranked =
    beyond.length > 1 ? beyond.map(({ cause }) => ({ cause, hours: edgeWithout(one, cause) })) : edges
  const [first] = ranked.toSorted((a, b) => (a.hours === b.hours ? 0 : b.hours - a.hours))
  if (first === undefined || first.hours - early < WORTH_ASKING * early) return null
  return { cause: first.cause, ask: askFor(first.cause, one) }
}

const MOST = 'it is what this time hangs on most'

/** What to tell us, in plain words. */
function askFor(cause: Cause, { joint, input, there, doubt }: Reckoned): string {
  const { allowance, movement } = joint
  switch (cause) {
    case 'allowance':
      if (allowance.basis === 'unknown') return `Tell us how the lid fits: ${MOST}.`
      if (allowance.basis === 'grade') return `Measure the clearance: ${MOST}.`
      return `Tell how the lid turned when it is back: how much the fit may lose is what this time hangs on most.`
    case 'sizes':
      return input.piece.wallMm === null
        ? `Measure the wall at the spigot: ${MOST}.`
        : `Measure how long the spigot is: ${MOST}.`
    case 'cut':
      return doubt.cutPct > 0.5
        ? `Tell when and where the joint was cut: ${MOST}.`
        : `Try the lid before it goes: how damp the joint was when it was cut is what this time hangs on most.`
    case 'before':
      return `Keep it where a sensor is read, or weigh it: how damp it is now is what this time hangs on most.`
    case 'air':
      return there.kind === 'told'
        ? `Read the air there when you arrive, and ask again: ${MOST}.`
        : `Look again just before it goes: the air there in those hours is what this time hangs on most.`
    case 'movement':
      if (movement.assumed.includes('wood')) return `Tell which wood it is: ${MOST}.`
      return movement.assumed.includes('movement')
        ? `Give its own figures for how far this wood moves, if you know them: ${MOST}.`
        : `Tell how the lid turned when it is back: how far this wood moves is what this time hangs on most.`
    case 'pace':
      return `Tell how the lid turned when it is back: how quickly this wood follows the air is what this time hangs on most, and is learned from that.`
  }
}
