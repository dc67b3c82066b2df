import { z } from 'zod'

/**
 * Every refusal that the API can answer with: its status and its title. The word is stable, and stands as a relative
 * address in `type`. Who adds a use case that is refused in a new way adds a word here.
 */
export const problems = {
  malformed: { status: 400, title: 'The request is not in the right form' },
  'signed-out': { status: 401, title: 'Sign in first' },
  'not-yours-to-do': { status: 403, title: 'Your role here does not allow that' },
  'other-address': { status: 403, title: 'This went to another e-mail address' },
  'foreign-origin': { status: 403, title: 'The request came from another site' },
  'not-found': { status: 404, title: 'Not there' },
  conflict: { status: 409, title: 'That clashes with what is there' },
  'name-taken': { status: 409, title: 'That name is taken' },
  'still-running': { status: 409, title: 'The same request is still being worked on' },
  'advised-against': { status: 409, title: 'The advice is to leave it where it is' },
  'already-out': { status: 409, title: 'That piece is out already' },
  'already-done': { status: 409, title: 'That is done already' },
  'changed-meanwhile': { status: 412, title: 'Somebody changed it meanwhile' },
  'too-large': { status: 413, title: 'The request is too large' },
  'not-json': { status: 415, title: 'The request must be JSON' },
  'not-possible': { status: 422, title: 'Understood, but not possible' },
  'key-reused': { status: 422, title: 'This key was used for another request' },
  'last-owner': { status: 422, title: 'A site needs an owner' },
  'invitation-over': { status: 422, title: 'This invitation can not be used any more' },
  'version-needed': { status: 428, title: 'Say which version you change' },
  'too-many': { status: 429, title: 'Too many requests' },
  'went-wrong': { status: 500, title: 'Something went wrong on our side' },
  'database-away': { status: 503, title: 'The database is away for a moment' },
} as const satisfies Record<string, { status: number; title: string }>

export type ProblemCode = keyof typeof problems

export const fieldErrorSchema = z.object({ path: z.string(), message: z.string() })
export type FieldError = z.infer<typeof fieldErrorSchema>

/** An answer by RFC 9457, Problem Details for HTTP APIs (2023). */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  errors: z.array(fieldErrorSchema).optional(),
  /** The thing as it is now, where a change was refused because of it. */
  current: z.unknown().optional(),
})
export type Problem = z.infer<typeof problemSchema>

const folder = '/problems/'

export const problemType = (code: ProblemCode): string => folder + code

/** The word in `type`, for code that reads an answer. */
export function problemCodeOf(problem: Pick<Problem, 'type'>): ProblemCode | undefined {
  const word = problem.type.startsWith(folder) ? problem.type.slice(folder.length) : ''
  return isProblemCode(word) ? word : undefined
}

const isProblemCode = (word: string): word is ProblemCode => Object.hasOwn(problems, word)
