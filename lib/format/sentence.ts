/** A stretch of a sentence; the strong ones are what it turns on. */
export type TextPart = { text: string; strong: boolean }

type Spoken = string | TextPart | readonly TextPart[]

/** The part of a sentence that stands in semibold. */
export const strong = (text: string): TextPart => ({ text, strong: true })

/**
 * A sentence in parts: say`${strong(name)} is silent`. What a person has typed stays text, whatever signs are in it,
 * because nothing in a text is read as markup.
 */
export function say(words: TemplateStringsArray, ...values: readonly Spoken[]): TextPart[] {
  const parts = words.flatMap((text, index) => {
    const value = index < values.length ? values[index] : undefined
    return [{ text, strong: false }, ...(value === undefined ? [] : partsOf(value))]
  })
  return parts.filter((part) => part.text !== '')
}

const partsOf = (value: Spoken): readonly TextPart[] =>
  typeof value === 'string' ? [{ text: value, strong: false }] : 'text' in value ? [value] : value

/** The same sentence without its emphasis. */
export const plainText = (parts: readonly TextPart[]): string => parts.map((part) => part.text).join('')

/** What is emphasised in it, in order. */
export const strongTexts = (parts: readonly TextPart[]): string[] =>
  parts.filter((part) => part.strong).map((part) => part.text)
