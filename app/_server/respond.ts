import 'server-only'
import { problems, problemType, type Problem } from '@/lib/api/problems'
import type { Failure } from './problem'

/** What a route answers with when all went well. */
export interface Answer {
  readonly ok: true
  readonly value: AnswerValue
}

export interface AnswerValue {
  /** `undefined` gives an answer without a body. */
  body: unknown
  status: number
  headers: Record<string, string>
}

export interface AnswerOptions {
  status?: number
  /** The version of the one thing answered; sent as its ETag. */
  etag?: number
  location?: string
  /** Cache-Control, for answers that are the same for everybody. Signed-in answers are `no-store` whatever stands here. */
  cache?: string
}

export function answer(body: unknown, options: AnswerOptions = {}): Answer {
  const headers: Record<string, string> = {}
  if (options.etag !== undefined) headers.etag = etagOf(options.etag)
  if (options.location !== undefined) headers.location = options.location
  if (options.cache !== undefined) headers['cache-control'] = options.cache
  return { ok: true, value: { body, status: options.status ?? (body === undefined ? 204 : 200), headers } }
}

export const etagOf = (version: number): string => `"${String(version)}"`

/** The version in an If-Match header; `undefined` for anything that we never sent as an ETag. */
export function versionOf(ifMatch: string): number | undefined {
  const digits = /^(?:W\/)?"(\d{1,9})"$/.exec(ifMatch.trim())?.[1]
  return digits === undefined ? undefined : Number(digits)
}

export function answerResponse({ body, status, headers }: AnswerValue): Response {
  if (body === undefined)
    return new Response(null, { status, headers: { 'cache-control': 'no-store', ...headers } })
  return new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/json; charset=utf-8', 'cache-control': 'no-store', ...headers },
  })
}

export function problemResponse(failure: Failure): Response {
  const { status, title } = problems[failure.code]
  const problem: Problem = {
    type: problemType(failure.code),
    title,
    status,
    detail: failure.detail,
    errors: failure.errors === undefined ? undefined : [...failure.errors],
    current: failure.current,
  }
  const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' })
  if (failure.version !== undefined) headers.set('etag', etagOf(failure.version))
  if (failure.retryAfterS !== undefined) headers.set('retry-after', String(Math.ceil(failure.retryAfterS)))
  return new Response(JSON.stringify(problem), { status, headers })
}
