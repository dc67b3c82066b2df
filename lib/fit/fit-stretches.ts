import type { FitGrade } from '@/lib/pieces/piece'
import { GRADE_FIGURES } from './grades'

export type FitStretchKind = 'cut-snug' | 'cut' | 'cut-easy' | 'rest'

/** A stretch of the moisture rule and what to do with a piece that stands on it. */
export type FitStretch = {
  readonly kind: FitStretchKind
  readonly fromMcPct: number
  readonly toMcPct: number
}

const SCALE_FROM_PCT = 0
const SCALE_TO_PCT = 30

/** Only a fit that is looser than snug can be cut tighter than it is wanted. */
const CAN_BE_SNUG: ReadonlySet<FitGrade> = new Set(['easy', 'loose'])

/**
 * What to do with a piece at each moisture content, as stretches of the rule from dry to damp.
 * @param year low and high that the joint will go through, % MC
 * @param lossMmPerPct what a quarter turn loses for each % MC, mm
 * @param grade the fit that is wanted
 * @param extraMaxMm most that may be left more, mm
 * @returns without gaps from 0 to 30 % MC. Each kind but the innermost lies on both sides of the better ones: drying and
 *   swelling take the same. "Cut it snug" is where the year takes so little that even a snug lid keeps its fit
 *
 * A joint cut x away from the middle of low and high goes as far as x and half the year's width. So each kind reaches
 * as far as what may be lost, divided by the loss for each % MC, less half that width. Status: derived.
 */
export function fitStretches(
  year: { readonly lowMcPct: number; readonly highMcPct: number },
  lossMmPerPct: number,
  grade: FitGrade,
  extraMaxMm: number,
): readonly FitStretch[] {
  const centrePct = (year.lowMcPct + year.highMcPct) / 2
  const halfYearPct = (year.highMcPct - year.lowMcPct) / 2
  const allowanceMm = GRADE_FIGURES[grade].allowanceMm ?? 0
  const reach = (mayLoseMm: number): number =>
    lossMmPerPct === 0 ? Infinity : mayLoseMm / lossMmPerPct - halfYearPct
  const reaches: readonly (readonly [FitStretchKind, number])[] = [
    ['rest', Infinity],
    ['cut-easy', reach(allowanceMm + extraMaxMm)],
    ['cut', reach(allowanceMm)],
    ['cut-snug', CAN_BE_SNUG.has(grade) ? reach(GRADE_FIGURES.snug.allowanceMm ?? 0) : -1],
  ]
  const kinds = reaches.filter(([, reachPct]) => reachPct > 0)
  const onScale = (mcPct: number) => Math.min(SCALE_TO_PCT, Math.max(SCALE_FROM_PCT, mcPct))
  const dry = kinds.map(([kind, reachPct], index) => ({
    kind,
    fromMcPct: onScale(centrePct - reachPct),
    toMcPct: onScale(centrePct - (kinds[index + 1]?.[1] ?? 0)),
  }))
  const damp = kinds
    .map(([kind, reachPct], index) => ({
      kind,
      fromMcPct: onScale(centrePct + (kinds[index + 1]?.[1] ?? 0)),
      toMcPct: onScale(centrePct + reachPct),
    }))
    .reverse()
  const innermost = kinds.at(-1)?.[0]
  const joined = [
    ...dry.filter((stretch) => stretch.kind !== innermost),
    ...dry
      .filter((stretch) => stretch.kind === innermost)
      .map((stretch) => ({ ...stretch, toMcPct: damp[0]?.toMcPct ?? stretch.toMcPct })),
    ...damp.filter((stretch) => stretch.kind !== innermost),
  ]
  return joined.filter((stretch) => stretch.toMcPct > stretch.fromMcPct)
}
