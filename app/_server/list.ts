import 'server-only'
import { z } from 'zod'

/** The query keys that every list has. Spread it into a `z.strictObject` beside the list's own keys. */
export const listQueryShape = <const S extends readonly [string, ...string[]]>(sorts: S) => ({
  limit: z
    .string()
    .regex(/^[1-9]\d{0,2}$/, 'a whole number from 1 to 200')
    .transform(Number)
    .refine((limit) => limit <= 200, 'a whole number from 1 to 200')
    .default(100),
  cursor: z.string().min(1).max(500).optional(),
  sort: z.enum(sorts, { error: `one of ${sorts.join(', ')}` }).default(sorts[0] as S[number]),
})

export interface Page<T> {
  items: T[]
  nextCursor: string | null
}

/**
 * One page out of up to `limit + 1` rows: ask the database for one more than is shown, and the extra row says that
 * there is a next page.
 * @param keyOf what the next page begins after, taken from the last row shown
 */
export function pageOf<T>(rows: readonly T[], limit: number, keyOf: (row: T) => unknown): Page<T> {
  const items = rows.slice(0, limit)
  const last = items.at(-1)
  return { items, nextCursor: rows.length > limit && last !== undefined ? encodeCursor(keyOf(last)) : null }
}

export const encodeCursor = (key: unknown): string => Buffer.from(JSON.stringify(key)).toString('base64url')

/** The key in a cursor; `undefined` for anything that we never gave out. Answer that with 400. */
export function decodeCursor<T>(cursor: string, schema: z.ZodType<T>): T | undefined {
  try {
    const parsed = schema.safeParse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')))
    return parsed.success ? parsed.data : undefined
  } catch (error) {
    if (error instanceof SyntaxError) return undefined
    throw error
  }
}
