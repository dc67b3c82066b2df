import { pooled, type YearScore } from './score'

/** The year's score as a table: what was asked for, what came of it for each seed and for all, and whether that is met. */

export interface ScoreRow {
  readonly what: string
  readonly goal: string
  readonly perSeed: readonly string[]
  readonly all: string
  readonly isMet: boolean | null
}

const share = (part: number, whole: number): number => (whole === 0 ? NaN : part / whole)
const percent = (value: number): string => (Number.isNaN(value) ? 'none' : `${(100 * value).toFixed(0)} %`)
const counted = (part: number, whole: number): string =>
  `${percent(share(part, whole))} (${String(part)}/${String(whole)})`

function quantile(values: readonly number[], at: number): number {
  const sorted = values.toSorted((one, other) => one - other)
  return sorted[Math.min(sorted.length - 1, Math.floor(at * sorted.length))] ?? NaN
}

interface Measure {
  readonly what: string
  readonly goal: string
  readonly told: (score: YearScore) => string
  readonly isMet: (score: YearScore) => boolean | null
}

const forecastShare = (score: YearScore, key: string): number => {
  const errors = score.forecast.get(key)
  return errors === undefined ? NaN : share(errors.own, errors.sameAsNow)
}

const forecastMeasure = (lead: string): Measure => ({
  what: `forecast error at ${lead} over that of "same as now"`,
  goal: '≤ 0.75',
  told: (score) => forecastShare(score, lead).toFixed(2),
  isMet: (score) => forecastShare(score, lead) <= 0.75,
})

const perWeek = (score: YearScore, notices: number): string => (notices / score.weeks).toFixed(1)

const MEASURES: readonly Measure[] = [
  {
    what: 'ill-advised planned carries warned of at least 30 min ahead',
    goal: '100 %',
    told: ({ warned, illAdvised }) => counted(warned, illAdvised),
    isMet: ({ warned, illAdvised }) => warned === illAdvised,
  },
  {
    what: 'forgotten boxes called in before they bind',
    goal: '≥ 95 %',
    told: ({ forgotten }) => counted(forgotten.calledIn, forgotten.needed),
    isMet: ({ forgotten }) => share(forgotten.calledIn, forgotten.needed) >= 0.95,
  },
  {
    what: 'false among "leave it where it is"',
    goal: '< 5 %',
    told: ({ falseLeaves, leaves }) => counted(falseLeaves, leaves),
    isMet: ({ falseLeaves, leaves }) => share(falseLeaves, leaves) < 0.05,
  },
  {
    what: 'time out told over true, median',
    goal: '0.4 to 0.9',
    told: ({ ratios }) => `${quantile(ratios, 0.5).toFixed(2)} (n ${String(ratios.length)})`,
    isMet: ({ ratios }) => quantile(ratios, 0.5) >= 0.4 && quantile(ratios, 0.5) <= 0.9,
  },
  {
    what: 'bound before the early edge that was told',
    goal: '1 in 10, by design',
    told: ({ edges }) => counted(edges.boundBefore, edges.told),
    isMet: () => null,
  },
  {
    what: 'notices a week',
    goal: '< 3',
    told: (score) => perWeek(score, score.notices),
    isMet: (score) => score.notices / score.weeks < 3,
  },
  forecastMeasure('6 h'),
  forecastMeasure('12 h'),
]

/** The rows that simulated years fill. */
export function yearRows(scores: readonly YearScore[]): ScoreRow[] {
  const all = pooled(scores)
  return MEASURES.map(({ what, goal, told, isMet }) => ({
    what,
    goal,
    perSeed: scores.map(told),
    all: told(all),
    isMet: isMet(all),
  }))
}

/** The row of what was measured for real. */
export function latencyRow(sortedMs: readonly number[], seeds: number): ScoreRow {
  const p99 = quantile(sortedMs, 0.99)
  const seconds = (ms: number): string => (ms / 1000).toFixed(1)
  return {
    what: 'reading to notice, 99 in 100',
    goal: '< 5 s',
    perSeed: Array.from({ length: seeds }, () => '–'),
    all: `${seconds(p99)} s (half ${seconds(quantile(sortedMs, 0.5))} s, n ${String(sortedMs.length)})`,
    isMet: p99 < 5_000,
  }
}

/** As a table that a terminal and a README both show. */
export function scoreTable(seeds: readonly number[], rows: readonly ScoreRow[]): string {
  const lines = [
    ['measure', 'goal', 'all', 'met', ...seeds.map((seed) => `seed ${String(seed)}`)],
    ...rows.map((row) => [
      row.what,
      row.goal,
      row.all,
      row.isMet === null ? '–' : row.isMet ? 'yes' : 'no',
      ...row.perSeed,
    ]),
  ]
  const widths = (lines[0] ?? []).map((_, n) => Math.max(...lines.map((line) => (line[n] ?? '').length)))
  const told = lines.map((line) => `| ${line.map((cell, n) => cell.padEnd(widths[n] ?? 0)).join(' | ')} |`)
  told.splice(1, 0, `| ${widths.map((width) => '-'.repeat(width)).join(' | ')} |`)
  return told.join('\n')
}

/** What stands beside the table: the counts that no goal is set for. */
export function scoreNotes(scores: readonly YearScore[]): string {
  const all = pooled(scores)
  const rules = [...all.byRule].sort(([, one], [, other]) => other - one)
  const { forgotten } = all
  const ratio = (at: number): string => quantile(all.ratios, at).toFixed(2)
  return [
    `Planned carries: ${String(all.plannedCarries)}, warned of: ${String(all.warnedCarries)}; ill-advised but planned less than 30 min ahead, so not counted: ${String(all.illAdvisedLate)}.`,
    `Forgotten boxes that kept their grade until they were missed: ${String(forgotten.notNeeded)}; gone before they went: ${String(forgotten.goneBefore)}.`,
    `Checks at the door: ${String(all.checks)}; false "leave it" among all of them: ${counted(all.falseLeaves, all.checks)}; "fine" of a box that lost its grade within the stay: ${counted(all.falseFines, all.fines)}.`,
    `Time out told over true, 1 in 10 and 9 in 10: ${ratio(0.1)} and ${ratio(0.9)}; told too late for the box (over 1): ${percent(share(all.ratios.filter((one) => one > 1).length, all.ratios.length))}.`,
    `Forecast made while nothing was warm, 6 and 12 h: ${forecastShare(all, '6 h unwarmed').toFixed(2)} and ${forecastShare(all, '12 h unwarmed').toFixed(2)}.`,
    `Notices a week by rule: ${rules.map(([rule, n]) => `${rule} ${perWeek(all, n)}`).join(', ')}.`,
  ].join('\n')
}

export const DEFINITIONS = `Ill-advised: some box's grade would be gone, in truth, within the stay as it was planned, at the cover asked for.
Warned: the notice of it was on its way, not held by quiet hours, 30 min before the hour that was planned.
Forgotten: out until it is missed the next morning; counted where its grade would have gone by then, but had not when it went.
False "leave it": the check at the door said so, and in truth the grade would have held for the whole stay.
Told over true: from the start to the early edge, over the time until the grade was gone, of boxes that lose it within 30 days.
Bound before: of those checks that told an early edge at all, whose box's grade was gone before it.
Notices: made for the site, each once, however many people and channels.
Forecast: of a shop's hours that nobody warmed, mean error of EMC; "same as now" is the last whole hour.
Reading to notice: from a reading sent over MQTT to the committed notice, 50 sites, PostgreSQL, broker and worker as they run.`
