import 'server-only'
import type { z } from 'zod'
import type { FieldError } from '@/lib/api/problems'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { fail, notThere, type Outcome } from './problem'
import { versionOf } from './respond'

const mostBodyBytes = 64 * 1024
const mostQueryKeys = 50

export const isChange = (request: Request): boolean => request.method !== 'GET' && request.method !== 'HEAD'

/**
 * A browser says with every change which site the page came from, and a page of another site can't forge it.
 * A client without that header is no browser, and has no business with a cookie.
 */
export function checkOrigin(request: Request): Outcome<undefined> {
  if (!isChange(request) || request.headers.get('origin') === serverConfig().baseUrl) return ok(undefined)
  return fail('foreign-origin', 'Changes are taken from pages of this site only.')
}

/** Form posts of other sites come as text or as form data; JSON can't be sent without asking first. */
function checkType(request: Request): Outcome<undefined> {
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase()
  if (type === 'application/json') return ok(undefined)
  return fail('not-json', 'Send it as application/json.')
}

async function readText(request: Request): Promise<Outcome<string>> {
  const tooLarge = fail('too-large', 'A request may have 64 KB at most.')
  if (Number(request.headers.get('content-length') ?? 0) > mostBodyBytes) return tooLarge
  if (request.body === null) return ok('')
  const reader = request.body.getReader()
  const parts: Uint8Array[] = []
  let size = 0
  for (;;) {
    const { done, value } = await reader.read()
    if (done) break
    size += value.byteLength
    if (size > mostBodyBytes) {
      await reader.cancel()
      return tooLarge
    }
    parts.push(value)
  }
  return ok(Buffer.concat(parts).toString('utf8'))
}

export interface ReadBody<T> {
  value: T
  /** The body as it came, for telling a retry from another request. */
  text: string
}

/** Reads the body of a change. Without a schema only an empty one passes. */
export async function readBody(
  request: Request,
  schema: z.ZodType | undefined,
): Promise<Outcome<ReadBody<unknown>>> {
  if (!isChange(request)) return ok({ value: undefined, text: '' })
  if (schema !== undefined || request.method !== 'DELETE') {
    const type = checkType(request)
    if (!type.ok) return type
  }
  const text = await readText(request)
  if (!text.ok) return text
  if (schema === undefined) {
    if (text.value === '' || text.value.trim() === '{}') return ok({ value: undefined, text: '' })
    return fail('malformed', 'Nothing is expected in the body here.')
  }
  // A DELETE may do without a body: the same as an empty one.
  const json = parseJson(text.value === '' && request.method === 'DELETE' ? '{}' : text.value)
  if (!json.ok) return json
  const parsed = schema.safeParse(json.value)
  if (!parsed.success) return malformed(parsed.error)
  return ok({ value: parsed.data, text: text.value })
}

// The one character that the database's text can't hold, written as JSON writes it.
const escapedNul = /(?<!\\)(?:\\\\)*\\u0000/

function parseJson(text: string): Outcome<unknown> {
  if (escapedNul.test(text)) return fail('malformed', 'The character NUL can not be stored.')
  try {
    return ok(JSON.parse(text) as unknown)
  } catch (error) {
    if (error instanceof SyntaxError) return fail('malformed', 'The body is not valid JSON.')
    throw error
  }
}

/** Reads the query. A key that comes twice becomes a list, which a schema for one value refuses. */
export function readQuery(request: Request, schema: z.ZodType | undefined): Outcome<unknown> {
  const search = new URL(request.url).searchParams
  if (search.size > mostQueryKeys) return fail('malformed', `At most ${mostQueryKeys} query keys.`)
  if (schema === undefined) {
    if (search.size === 0) return ok(undefined)
    return fail('malformed', 'No query is expected here.', {
      errors: [...new Set(search.keys())].map((path) => ({ path, message: 'not known here' })),
    })
  }
  const given: Record<string, string | string[]> = Object.create(null) as Record<string, never>
  for (const name of new Set(search.keys())) {
    const values = search.getAll(name)
    given[name] = values.length === 1 ? (values[0] ?? '') : values
  }
  if ([...search].flat().join('').includes('\0'))
    return fail('malformed', 'The character NUL can not be looked for.')
  const parsed = schema.safeParse({ ...given })
  return parsed.success ? ok(parsed.data) : malformed(parsed.error)
}

/** An id in the address that we could never have given out is answered like any other that isn't there. */
export function readParams(params: unknown, schema: z.ZodType): Outcome<unknown> {
  const parsed = schema.safeParse(params)
  return parsed.success ? ok(parsed.data) : notThere()
}

export function readIfMatch(request: Request): Outcome<number> {
  const header = request.headers.get('if-match')
  if (header === null) {
    return fail(
      'version-needed',
      'Send the ETag that you last read as If-Match, so that no change of others is lost.',
    )
  }
  const version = versionOf(header)
  return version === undefined
    ? fail('malformed', 'If-Match is not an ETag that was given out here.')
    : ok(version)
}

export function readIdempotencyKey(request: Request): Outcome<string> {
  const key = request.headers.get('idempotency-key') ?? ''
  if (/^[\x21-\x7e]{8,200}$/.test(key)) return ok(key)
  const message =
    'needed here: 8 to 200 letters or digits of your own choice, the same when you send the request again'
  return fail('malformed', `Idempotency-Key: ${message}`, { errors: [{ path: 'Idempotency-Key', message }] })
}

function malformed(error: z.ZodError) {
  const errors = error.issues.flatMap(fieldErrors).slice(0, 50)
  const first = errors[0]
  const detail =
    first === undefined ? undefined : first.path === '' ? first.message : `${first.path}: ${first.message}`
  return fail('malformed', detail, { errors })
}

function fieldErrors(issue: z.core.$ZodIssue): FieldError[] {
  const path = issue.path.map(String).join('.')
  if (issue.code !== 'unrecognized_keys') return [{ path, message: issue.message }]
  return issue.keys.map((key) => ({
    path: (path === '' ? key : `${path}.${key}`).slice(0, 200),
    message: 'not known here',
  }))
}
