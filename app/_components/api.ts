import { type Problem, problemSchema } from '@/lib/api/problems'

/** What the API says when it can't do what was asked: RFC 9457, with one line for each field that is wrong. */
export class ApiProblem extends Error {
  readonly type: string
  readonly title: string
  readonly status: number
  readonly detail: string
  readonly errors: readonly { path: string; message: string }[]
  /** With 412: the thing as it is now. */
  readonly current: unknown

  constructor(problem: Problem) {
    super(problem.detail ?? problem.title)
    this.name = 'ApiProblem'
    this.type = problem.type
    this.title = problem.title
    this.status = problem.status
    this.detail = problem.detail ?? ''
    this.errors = problem.errors ?? []
    this.current = problem.current
  }

  /** The message for one field of a form, by its path: "wallMm", "rooms.0.name". */
  errorOf(path: string): string | undefined {
    return this.errors.find((error) => error.path === path)?.message
  }
}

type ApiOptions = {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  body?: unknown
  /** The version that this change was made on; sent as an entity tag. */
  ifMatch?: number | string
  idempotencyKey?: string
  signal?: AbortSignal
}

/**
 * The pages' one way to the API: an address under `/api/v1`, JSON both ways.
 * @throws ApiProblem when the server answered with an error; TypeError when no answer came at all.
 */
export async function apiFetch<Answer>(path: string, options: ApiOptions = {}): Promise<Answer> {
  const { method = 'GET', body, ifMatch, idempotencyKey, signal } = options
  const headers = new Headers({ accept: 'application/json' })
  if (method !== 'GET') headers.set('content-type', 'application/json')
  if (ifMatch !== undefined)
    headers.set('if-match', typeof ifMatch === 'number' ? `"${String(ifMatch)}"` : ifMatch)
  if (idempotencyKey !== undefined) headers.set('idempotency-key', idempotencyKey)
  const response = await fetch(`/api/v1${path}`, {
    method,
    headers,
    body: body === undefined ? undefined : JSON.stringify(body),
    signal,
    credentials: 'same-origin',
    cache: 'no-store',
  })
  const text = await response.text()
  if (!response.ok) throw new ApiProblem(problemOf(text, response))
  return (text === '' ? undefined : JSON.parse(text)) as Answer
}

function problemOf(text: string, response: Response): Problem {
  const unreadable: Problem = {
    type: 'unreadable',
    title: 'The answer could not be read',
    status: response.status,
    detail: 'Try again in a moment.',
  }
  try {
    const parsed = problemSchema.safeParse(JSON.parse(text))
    return parsed.success ? parsed.data : unreadable
  } catch (error) {
    if (error instanceof SyntaxError) return unreadable
    throw error
  }
}

/** What to tell a person about an error: what happened, and what to do next. */
export function describeError(error: unknown): { title: string; detail: string } {
  if (error instanceof ApiProblem) return { title: error.title, detail: error.detail }
  return {
    title: 'Lidfast could not be reached',
    detail: 'Nothing was changed. Look at the connection and try again.',
  }
}
