import type { TruthAir, TrueRoom } from './truth-air'
import { trueEmcPct } from './truth-emc'
import {
  copyPart,
  meanOfPart,
  OPENING,
  stepPart,
  type TrueCover,
  type TruePart,
  truePart,
  type TrueShape,
  type TrueStuff,
} from './truth-wood'

/** What is true of a box, and what nobody is told. */
export interface TrueBox {
  readonly stuff: TrueStuff
  readonly ringShape: TrueShape
  readonly lidShape: TrueShape
  readonly diameterMm: number
  /** In the plane of the joint, fraction per % MC. */
  readonly mostPerPct: number
  readonly leastPerPct: number
  readonly isRingInside: boolean
  readonly allowanceMm: number
  /** How fast the air in a bag round it comes to the room's, 1/h. */
  readonly bagPerH: number
}

export interface TrueWood {
  atMs: number
  ring: TruePart
  lid: TruePart
  /** What the air in a bag holds, % MC; null outside of one. */
  baggedPct: number | null
}

export interface TrueCut {
  readonly ringPct: number
  readonly lidPct: number
}

/** The site as the wood has it: its air, and how its wood differs from the curve. */
export interface TrueSite {
  readonly air: TruthAir
  readonly bend: number
}

const MINUTE_MS = 60_000
const HOUR_MS = 3_600_000

export const evenWood = (box: TrueBox, atMs: number, mcPct: number): TrueWood => ({
  atMs,
  ring: truePart(box.ringShape, mcPct),
  lid: truePart(box.lidShape, mcPct),
  baggedPct: null,
})

export const copyWood = (wood: TrueWood): TrueWood => ({
  ...wood,
  ring: copyPart(wood.ring),
  lid: copyPart(wood.lid),
})

export const cutOfWood = ({ ring, lid }: TrueWood): TrueCut => ({
  ringPct: meanOfPart(ring),
  lidPct: meanOfPart(lid),
})

/**
 * Clearance lost where the joint is tightest, whichever way the lid is turned, mm: what the inner part outgrew the outer,
 * and the two ovals' halves, which stand across one another at the worst. To first order, good to 0.01 mm.
 */
export function lostMm(box: TrueBox, wood: TrueWood, cut: TrueCut): number {
  const ring = meanOfPart(wood.ring) - cut.ringPct
  const lid = meanOfPart(wood.lid) - cut.lidPct
  const ahead = box.isRingInside ? ring - lid : lid - ring
  const grows = (box.diameterMm * (box.mostPerPct + box.leastPerPct)) / 2
  const bends = (box.diameterMm * (box.mostPerPct - box.leastPerPct)) / 2
  return grows * ahead + bends * (Math.abs(ring) + Math.abs(lid))
}

function step(box: TrueBox, wood: TrueWood, site: TrueSite, room: TrueRoom, cover: TrueCover, ms: number) {
  const { temperatureC, humidityPct } = site.air.at(room, wood.atMs + ms / 2)
  const hours = ms / HOUR_MS
  let emcPct = trueEmcPct(temperatureC, humidityPct, site.bend)
  if (cover === 'bagged') {
    const inside = wood.baggedPct ?? meanOfPart(wood.ring)
    wood.baggedPct = inside + (emcPct - inside) * -Math.expm1(-box.bagPerH * hours)
    emcPct = wood.baggedPct
  } else wood.baggedPct = null
  const opening = OPENING[cover]
  stepPart(wood.ring, box.stuff, opening, { emcPct, temperatureC }, hours)
  // A plug has no rim; its lower face looks into the box.
  stepPart(wood.lid, box.stuff, opening, { emcPct, temperatureC }, hours)
  wood.atMs += ms
}

/** Brings true wood on to a moment, in place; each step at most `stepMs`. */
export function advance(
  box: TrueBox,
  wood: TrueWood,
  site: TrueSite,
  room: TrueRoom,
  cover: TrueCover,
  untilMs: number,
  stepMs: number,
): void {
  while (wood.atMs < untilMs) step(box, wood, site, room, cover, Math.min(stepMs, untilMs - wood.atMs))
}

export const OUT_STEP_MS = 5 * MINUTE_MS

/** Small steps while much happens: an hour by the minute, a day by five, three by twenty, then by the hour. */
const stepAfter = (goneMs: number): number => {
  if (goneMs < HOUR_MS) return MINUTE_MS
  return goneMs < 24 * HOUR_MS ? OUT_STEP_MS : goneMs < 72 * HOUR_MS ? 20 * MINUTE_MS : HOUR_MS
}

/**
 * When the grade of a box would be gone if it went now and stayed.
 * @returns epoch ms, the start itself where it is gone already; null where it holds to the end of the span
 */
export function goneAt(
  box: TrueBox,
  start: TrueWood,
  cut: TrueCut,
  site: TrueSite,
  stay: { readonly room: TrueRoom; readonly cover: TrueCover; readonly untilMs: number },
): number | null {
  const wood = copyWood(start)
  let before = lostMm(box, wood, cut)
  if (before >= box.allowanceMm) return start.atMs
  while (wood.atMs < stay.untilMs) {
    const ms = Math.min(stepAfter(wood.atMs - start.atMs), stay.untilMs - wood.atMs)
    step(box, wood, site, stay.room, stay.cover, ms)
    const after = lostMm(box, wood, cut)
    if (after >= box.allowanceMm) return wood.atMs - ms * ((after - box.allowanceMm) / (after - before))
    before = after
  }
  return null
}
