import type { FitCheck, FitCheckInput } from '@/lib/fit/fit-check'

export type RuleSpan = { readonly from: number; readonly to: number }

const MARGIN_PCT = 0.7
const LEAST_SPAN_PCT = 4

/**
 * The stretch of the moisture rule that a fit check is about, in whole tenths of % MC.
 * @returns with the year, the piece with its doubt, and the ends of what may be cut in sight; 0 to 30
 */
export function fitCheckSpan(input: FitCheckInput, check: FitCheck & { kind: 'verdict' }): RuleSpan {
  const cuttable = check.stretches.filter(({ kind }) => kind !== 'rest')
  const places = [
    input.target.lowMcPct,
    input.target.highMcPct,
    input.mcPct - input.mcDoubtPct,
    input.mcPct + input.mcDoubtPct,
    // A joint that hardly loses anything may be cut anywhere: that must not spread the rule over all of it.
    ...cuttable
      .flatMap(({ fromMcPct, toMcPct }) => [fromMcPct, toMcPct])
      .filter((mcPct) => Math.abs(mcPct - input.target.middleMcPct) < 5),
  ]
  const low = Math.min(...places) - MARGIN_PCT
  const high = Math.max(...places) + MARGIN_PCT
  const more = Math.max(0, LEAST_SPAN_PCT - (high - low)) / 2
  return {
    from: Math.max(0, Math.floor((low - more) * 10) / 10),
    to: Math.min(30, Math.ceil((high + more) * 10) / 10),
  }
}

export type RuleTick = { readonly mcPct: number; readonly length: number; readonly label?: string }

/** Ticks of 0.1, 0.5 and 1 % MC; the finest only where they stand apart. */
export function ruleTicks({ from, to }: RuleSpan, width: number): readonly RuleTick[] {
  const hasTenths = width / (to - from) >= 40
  const count = Math.floor((to - from) * 10 + 1e-6)
  return Array.from({ length: count + 1 }, (_, n) => Math.round(from * 10) + n)
    .filter((tenths) => hasTenths || tenths % 5 === 0)
    .map((tenths) => {
      const mcPct = tenths / 10
      if (tenths % 10 === 0) return { mcPct, length: 14, label: String(mcPct) }
      return { mcPct, length: tenths % 5 === 0 ? 10 : 6 }
    })
}
