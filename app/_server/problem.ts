import 'server-only'
import type { FieldError, ProblemCode } from '@/lib/api/problems'
import { err, type Result } from '@/lib/result'

/** Why a use case did not do what it was asked. `respond.ts` alone turns the code into HTTP. */
export interface Failure {
  code: ProblemCode
  /** What was wrong and what to do, in plain words. */
  detail?: string
  errors?: readonly FieldError[]
  /** With `changed-meanwhile`: the thing as it is now, and its version. */
  current?: unknown
  version?: number
  retryAfterS?: number
}

export type Outcome<T> = Result<T, Failure>

export function fail(
  code: ProblemCode,
  detail?: string,
  more: Omit<Failure, 'code' | 'detail'> = {},
): { readonly ok: false; readonly error: Failure } {
  return err<Failure>({ code, detail, ...more })
}

/** One sentence for every address that isn't there or isn't yours, so that the two can't be told apart. */
export const notThere = () => fail('not-found', 'There is nothing here that you can see.')

/** A refusal that names one field of the request. */
export const failField = (code: ProblemCode, path: string, message: string) =>
  fail(code, `${path}: ${message}`, { errors: [{ path, message }] })
