/** How a number of a rule is meant; which of them change with the reader's units stands in `rule-units.ts`. */
export type RuleUnit =
  | 'min'
  | 'h'
  | 'days'
  | 'points'
  | 'emc-pct'
  | 'rh-pct'
  | 'kelvin'
  | 'celsius'
  | 'used-pct'
  | 'charge-pct'
  | 'count'

/** A changeable word of a rule's sentence. Values are SI, whatever the reader sees. */
export type Control =
  | {
      readonly kind: 'number'
      readonly label: string
      readonly unit: RuleUnit
      readonly usual: number
      readonly min: number
      readonly max: number
    }
  | { readonly kind: 'time'; readonly label: string; readonly usual: string }
  | {
      readonly kind: 'choice'
      readonly label: string
      readonly usual: string
      readonly options: readonly { readonly value: string; readonly words: string }[]
    }
  /** Rooms by their codes; none named: those that the words say. */
  | {
      readonly kind: 'rooms'
      readonly label: string
      readonly usual: readonly string[]
      readonly noneWords: string
    }

export interface RuleForm {
  /** As it comes. */
  readonly isOn: boolean
  /** The sentence, with `{key}` for each changeable word and `{=name}` for what is set elsewhere. */
  readonly words: string
  readonly controls: Readonly<Record<string, Control>>
  /** Whether the last 90 days can be gone through again by it: from the record, or only counted by what was told. */
  readonly replay: 'record' | 'told'
}
