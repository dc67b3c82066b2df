import { err, ok, type Result } from '@/lib/result'
import type { Refusal, RefusalReason } from './refusal'

/** A message of ours is three levels deep: an object, its list, a reading. */
const MAX_DEPTH = 8
/** More digits than any measurement has; a number that long is a fault or an attack on the parser. */
const LONG_NUMBER = /[0-9.]{40}/

const OPEN_BRACE = 0x7b
const CLOSE_BRACE = 0x7d
const OPEN_BRACKET = 0x5b
const CLOSE_BRACKET = 0x5d
const QUOTE = 0x22
const BACKSLASH = 0x5c

const decoder = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true })

const refusal = (reason: RefusalReason, field: string | null = null, detail = ''): Refusal => ({
  reason,
  field,
  detail,
})

/** The JSON value in these bytes, strictly: nothing is repaired, guessed or cut off. */
export function decodeJson(bytes: Uint8Array): Result<unknown, Refusal> {
  const unreadable = unreadableBytes(bytes)
  if (unreadable) return err(refusal(unreadable))
  const text = decodeText(bytes)
  if (text === undefined) return err(refusal('not-utf-8'))
  const long = LONG_NUMBER.exec(text)
  if (long) return err(refusal('not-a-number', keyBefore(text, long.index), shown(long[0])))
  try {
    return ok(JSON.parse(text) as unknown)
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error
    return err(notJson(text))
  }
}

function unreadableBytes(bytes: Uint8Array): RefusalReason | undefined {
  if (bytes.length === 0) return 'empty'
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return 'byte-order-mark'
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) return 'not-utf-8'
  if (bytes.includes(0)) return 'nul'
  return isTooDeep(bytes) ? 'too-deep' : undefined
}

/** Counts open brackets outside strings: one pass over the bytes, before anything is built from them. */
function isTooDeep(bytes: Uint8Array): boolean {
  let depth = 0
  let inString = false
  for (let i = 0; i < bytes.length; i += 1) {
    const byte = bytes[i]
    if (inString) {
      if (byte === BACKSLASH) i += 1
      else if (byte === QUOTE) inString = false
    } else if (byte === QUOTE) inString = true
    else if (byte === OPEN_BRACE || byte === OPEN_BRACKET) {
      depth += 1
      if (depth > MAX_DEPTH) return true
    } else if (byte === CLOSE_BRACE || byte === CLOSE_BRACKET) depth -= 1
  }
  return false
}

function decodeText(bytes: Uint8Array): string | undefined {
  try {
    return decoder.decode(bytes)
  } catch (error) {
    if (error instanceof TypeError) return undefined
    throw error
  }
}

// What programs write where JSON has no number for it: NaN, Infinity, 0x10, 1_000, 21,5, +3, .5
const oddNumber =
  /"([A-Za-z]{1,40})"\s*:\s*([+-]?(?:NaN|nan|Infinity|inf\b|0x[0-9a-fA-F]+|\d+_\d+|\d+,\d|\.\d)|\+\d)/

function notJson(text: string): Refusal {
  const [, key, value] = oddNumber.exec(text) ?? []
  if (key === undefined || value === undefined) return refusal('not-json')
  return refusal('not-a-number', key, shown(value))
}

function keyBefore(text: string, index: number): string | null {
  return /"([A-Za-z]{1,40})"\s*:\s*-?$/.exec(text.slice(Math.max(0, index - 64), index))?.[1] ?? null
}

export const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** A value for people to look at: short, and in letters that any log, table or page can hold. */
export function shown(value: unknown): string {
  if (typeof value === 'number') return Object.is(value, -0) ? '-0' : String(value)
  if (Array.isArray(value)) return 'a list'
  if (isRecord(value)) return 'an object'
  const text = JSON.stringify(value) ?? 'nothing'
  return (text.length > 60 ? `${text.slice(0, 59)}…` : text).replace(/[^\x20-\x7e…]/g, '·')
}
