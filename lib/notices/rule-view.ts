import { z } from 'zod'
import type { Control } from './rule-form'
import {
  type RuleChoice,
  ruleForms,
  type RuleValue,
  type ToldRule,
  toldRules,
  toldRuleSchema,
  valuesOf,
} from './rule-settings'

/** A changeable word of a rule, with the value that it stands at. */
export type ControlView = Control & { key: string; value: RuleValue }

/** A rule as its page shows it: a sentence in parts, of which some can be changed. */
export interface RuleView {
  rule: ToldRule
  isOn: boolean
  version: number
  parts: ({ text: string } | { control: ControlView })[]
  /** Everything is as it comes. */
  isUsual: boolean
  /** Whether its preview is worked out from the record, or counted from what was told. */
  replay: 'record' | 'told'
  lastChange: { at: string; by: string | null; canUndo: boolean } | null
}

/** Every rule of a site, and the rooms that may be named in them. */
export interface RuleList {
  items: RuleView[]
  rooms: { id: string; name: string }[]
}

/** What is set elsewhere, and only shown in a sentence. */
export interface SentenceTimes {
  quietFrom: string
  quietTo: string
  lockUpAt: string
}

/** One rule of a site: its own choices, or as it comes. */
export function ruleView(
  rule: ToldRule,
  own: (RuleChoice & { version: number }) | undefined,
  times: SentenceTimes,
  lastChange: RuleView['lastChange'],
): RuleView {
  const form = ruleForms[rule]
  const controls: Readonly<Record<string, Control>> = form.controls
  const values: Readonly<Record<string, RuleValue>> = valuesOf(rule, own?.settings)
  return {
    rule,
    isOn: own?.isOn ?? form.isOn,
    version: own?.version ?? 1,
    parts: partsOf(form.words, controls, values, times),
    isUsual: own === undefined || (own.isOn === form.isOn && Object.keys(own.settings).length === 0),
    replay: form.replay,
    lastChange,
  }
}

function partsOf(
  words: string,
  controls: Readonly<Record<string, Control>>,
  values: Readonly<Record<string, RuleValue>>,
  times: SentenceTimes,
): RuleView['parts'] {
  return words.split(/(\{=?\w+\})/).flatMap((piece): RuleView['parts'] => {
    const [, isFixed, key] = /^\{(=?)(\w+)\}$/.exec(piece) ?? []
    if (key === undefined) return piece === '' ? [] : [{ text: piece }]
    if (isFixed === '=') return [{ text: fixedWords(key, times) }]
    const control = controls[key]
    return control === undefined
      ? []
      : [{ control: { ...control, key, value: values[key] ?? control.usual } }]
  })
}

function fixedWords(key: string, times: SentenceTimes): string {
  if (key === 'lockUpAt') return times.lockUpAt
  return times.quietFrom === times.quietTo
    ? ' (there are none, so there is no last call)'
    : `, at ${times.quietFrom}`
}

/** Every rule, in the order in which a page shows them. */
export const ruleOrder: readonly ToldRule[] = toldRules

/** The values of a rule's words as they stand. */
export const valuesOfView = (rule: RuleView): Record<string, RuleValue> =>
  Object.fromEntries(
    rule.parts.flatMap((part) => ('control' in part ? [[part.control.key, part.control.value]] : [])),
  )

/** The values that differ from how a rule comes: only those are stored. */
export function changedValues(rule: ToldRule, values: Readonly<Record<string, RuleValue | undefined>>) {
  const controls: Readonly<Record<string, Control>> = ruleForms[rule].controls
  const isSame = (one: RuleValue, other: RuleValue) => JSON.stringify(one) === JSON.stringify(other)
  return Object.fromEntries(
    Object.entries(values).flatMap(([key, value]) => {
      const control = controls[key]
      return value === undefined || control === undefined || isSame(value, control.usual)
        ? []
        : [[key, value]]
    }),
  )
}

const valueSchema = z.union([z.number(), z.string().max(80), z.array(z.string().max(40)).max(60)])

/** PATCH of one rule. Each value is held against its own range by `settingsSchemaOf`. */
export const ruleChangeSchema = z.strictObject({
  rule: toldRuleSchema,
  isOn: z.boolean().optional(),
  settings: z.record(z.string().max(40), valueSchema).optional(),
})
export type RuleChangeRequest = z.infer<typeof ruleChangeSchema>
/** What is sent of a rule, from its page. */
export type RuleWish = { isOn?: boolean; settings?: Record<string, RuleValue> }

export const rulePreviewSchema = z.strictObject({
  rule: toldRuleSchema,
  settings: z.record(z.string().max(40), valueSchema).optional(),
})

export const ruleUndoSchema = z.strictObject({ rule: toldRuleSchema })

/** What a preview answers. */
export interface RulePreview {
  rule: ToldRule
  by: 'record' | 'told'
  /** One sentence: "would have told you 4 times in the last 90 days". */
  words: string
  /** The first and the last moment of what was looked at. */
  from: string
  to: string
  moments: { at: string; of: string }[]
}
