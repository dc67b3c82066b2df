import { z } from 'zod'
import { timeOfDaySchema } from '@/lib/sites/site'
import type { Rule } from './notice'
import { silentAfterMs } from './policy'
import type { Control, RuleForm } from './rule-form'
import { carryRuleForms } from './rule-forms-carry'
import { yardRuleForms } from './rule-forms-yard'

/** Every rule that can be switched. "Test" is no rule: somebody asks for it. */
export type ToldRule = Exclude<Rule, 'test'>

export const ruleForms = { ...carryRuleForms, ...yardRuleForms } as const satisfies Record<ToldRule, RuleForm>

export const toldRules = Object.keys(ruleForms) as ToldRule[]
export const toldRuleSchema = z.enum(toldRules as [ToldRule, ...ToldRule[]])

type ValueOf<C> = C extends { kind: 'number' }
  ? number
  : C extends { kind: 'rooms' }
    ? readonly string[]
    : string
export type ValuesOf<R extends ToldRule> = {
  readonly [K in keyof (typeof ruleForms)[R]['controls']]: ValueOf<(typeof ruleForms)[R]['controls'][K]>
}
export type RuleValue = number | string | readonly string[]

/** What a site has chosen of one rule: only what differs from how it comes. */
export interface RuleChoice {
  isOn: boolean
  settings: Readonly<Record<string, RuleValue>>
}
export type RuleBook = ReadonlyMap<string, RuleChoice>

const valueSchemaOf = (control: Control): z.ZodType<RuleValue> => {
  if (control.kind === 'number') {
    const range = `${String(control.min)} to ${String(control.max)}`
    return z.number().min(control.min, range).max(control.max, range)
  }
  if (control.kind === 'time') return timeOfDaySchema
  if (control.kind === 'rooms') return z.array(z.string().max(40)).max(60)
  return z.enum(control.options.map(({ value }) => value) as [string, ...string[]])
}

/** What may be set of a rule: each of its words by its own range, and nothing else. */
export function settingsSchemaOf(rule: ToldRule): z.ZodType<Record<string, RuleValue | undefined>> {
  const controls: Readonly<Record<string, Control>> = ruleForms[rule].controls
  return z.strictObject(
    Object.fromEntries(
      Object.entries(controls).map(([key, control]) => [key, valueSchemaOf(control).optional()]),
    ),
  )
}

/**
 * The values that a rule goes by: the site's where it has set some, else as they come. A stored value that is out of
 * range (of an older make) counts as not set.
 */
export function valuesOf<R extends ToldRule>(
  rule: R,
  settings: Readonly<Record<string, unknown>> = {},
): ValuesOf<R> {
  const controls: Readonly<Record<string, Control>> = ruleForms[rule].controls
  const values = Object.entries(controls).map(([key, control]) => {
    const set = settings[key]
    // Most are as they come, and are asked for at every look: no schema is made for those.
    const own = set === undefined ? undefined : valueSchemaOf(control).safeParse(set)
    return [key, own?.success === true ? own.data : control.usual] as const
  })
  return Object.fromEntries(values) as ValuesOf<R>
}

/** What a rule goes by at a site: whether it is on, and its values. */
export function choiceOf<R extends ToldRule>(
  book: RuleBook | undefined,
  rule: R,
): { isOn: boolean; values: ValuesOf<R> } {
  const own = book?.get(rule)
  return { isOn: own?.isOn ?? ruleForms[rule].isOn, values: valuesOf(rule, own?.settings) }
}

export const isRuleOn = (book: RuleBook | undefined, rule: Rule): boolean =>
  rule === 'test' || choiceOf(book, rule).isOn

/** From how long after it was last heard a sensor counts as silent at a site, ms. */
export function silentAfterOf(book: RuleBook | undefined, usualGapS: number | null): number {
  const { gaps, leastH } = choiceOf(book, 'sensor-silent').values
  return silentAfterMs(usualGapS, gaps, leastH * 3_600_000)
}

/** Whether a rule looks at a room: one that was named, or, with none named, one that it means by itself. */
export const isInScope = (named: readonly string[], roomCode: string, usual: boolean): boolean =>
  named.length === 0 ? usual : named.includes(roomCode)
