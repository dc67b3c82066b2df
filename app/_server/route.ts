import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import type { Database } from '@/db/schema'
import { may, type Action } from '@/lib/sites/permissions'
import { codeSchema } from '@/lib/sites/site'
import { database, isDatabaseAway } from './database'
import { once } from './idempotency'
import { log } from './log'
import { fail, notThere, type Failure, type Outcome } from './problem'
import { checkOrigin, readBody, readIdempotencyKey, readIfMatch, readParams, readQuery } from './request'
import { answerResponse, problemResponse, type AnswerValue } from './respond'
import { findSession, type SignedInUser } from './session'

/** What Next calls for one method of one address. */
export type RouteHandler = (request: Request, context: { params: Promise<unknown> }) => Promise<Response>

type Shape = Record<string, z.ZodType>
type ParamsOf<P> = P extends Shape ? { [K in keyof P]: z.output<P[K]> } : Record<never, never>
type ValueOf<S> = S extends z.ZodType ? z.output<S> : undefined

export interface Asked<P, Q, B> {
  request: Request
  params: ParamsOf<P>
  query: ValueOf<Q>
  body: ValueOf<B>
  db: Kysely<Database>
  now: Date
}

interface Own<V> {
  /** The version that the client last read, where the route says `ifMatch`. */
  ifMatch: V extends true ? number : undefined
  /** Does something once the change is stored: sending a mail, say. A failure there is logged and undoes nothing. */
  afterwards: (work: () => Promise<void>) => void
}

type Reply = Outcome<AnswerValue> | Response

interface Spec<P, Q, B> {
  /** The parts of the address in brackets, but for `site`, which `siteRoute` reads by itself. */
  params?: P
  /** A `z.strictObject` of the query. Without one, any query is refused. */
  query?: Q
  /** A `z.strictObject` of the body. Without one, any body is refused. */
  body?: B
}

interface ChangeSpec<P, Q, B, V> extends Spec<P, Q, B> {
  /** For a POST that makes something: needs an Idempotency-Key, and runs in a transaction that the handler gets as `db`. */
  creates?: boolean
  /** For a change that two people may make at once: needs If-Match. */
  ifMatch?: V
}

/** A route for everybody. */
export function publicRoute<
  P extends Shape | undefined,
  Q extends z.ZodType | undefined,
  B extends z.ZodType | undefined,
>(spec: Spec<P, Q, B>, handle: (asked: Asked<P, Q, B>) => Promise<Reply> | Reply): RouteHandler {
  return guarded(async (request, params) => {
    const origin = checkOrigin(request)
    if (!origin.ok) return origin
    const input = await readInput(request, params, spec)
    if (!input.ok) return input
    return handle({ request, db: database(), now: new Date(), ...input.value.asked })
  })
}

/**
 * A route for everybody that other servers press too: neither origin nor body is looked at, so what it may do has to
 * stand in its address alone.
 */
export function openRoute<P extends Shape | undefined>(
  spec: Pick<Spec<P, undefined, undefined>, 'params'>,
  handle: (asked: { request: Request; params: ParamsOf<P>; now: Date }) => Promise<Reply> | Reply,
): RouteHandler {
  return guarded(async (request, params) => {
    const address = readParams(params, z.object(spec.params ?? {}))
    if (!address.ok) return address
    return handle({ request, params: address.value as ParamsOf<P>, now: new Date() })
  })
}

/** A route for anybody who is signed in, whatever the site. */
export function signedInRoute<
  P extends Shape | undefined,
  Q extends z.ZodType | undefined,
  B extends z.ZodType | undefined,
  V extends boolean | undefined,
>(
  spec: ChangeSpec<P, Q, B, V>,
  handle: (asked: Asked<P, Q, B> & Own<V> & { user: SignedInUser }) => Promise<Reply> | Reply,
): RouteHandler {
  return guarded(async (request, params) =>
    withUser(request, async (user) =>
      runChange(request, params, spec, user, (asked) => handle({ ...asked, user })),
    ),
  )
}

/** A route of one site: for members whose role allows the action. */
export function siteRoute<
  P extends Shape | undefined,
  Q extends z.ZodType | undefined,
  B extends z.ZodType | undefined,
  V extends boolean | undefined,
>(
  spec: ChangeSpec<P, Q, B, V> & { action: Action },
  handle: (
    asked: Asked<P, Q, B> & Own<V> & { user: SignedInUser; member: SiteMember },
  ) => Promise<Reply> | Reply,
): RouteHandler {
  return guarded(async (request, params) =>
    withUser(request, async (user) => {
      const site = z.object({ site: codeSchema }).safeParse(params)
      const member = site.success ? await findSiteMember(database(), site.data.site, user.id) : undefined
      if (member === undefined) {
        // To be seen by who runs the machine: many of these from one person are somebody trying ids.
        log().info(
          { userId: user.id, path: new URL(request.url).pathname },
          'asked for a site that is not theirs',
        )
        return notThere()
      }
      if (!may(member.role, spec.action)) {
        return fail('not-yours-to-do', `Your role here is ${member.role}, which does not allow that.`)
      }
      return runChange(request, params, spec, user, (asked) => handle({ ...asked, user, member }))
    }),
  )
}

interface Input<P, Q, B> {
  asked: Pick<Asked<P, Q, B>, 'params' | 'query' | 'body'>
  bodyText: string
}

async function readInput<
  P extends Shape | undefined,
  Q extends z.ZodType | undefined,
  B extends z.ZodType | undefined,
>(request: Request, params: unknown, spec: Spec<P, Q, B>): Promise<Outcome<Input<P, Q, B>>> {
  const address = readParams(params, z.object(spec.params ?? {}))
  if (!address.ok) return address
  const query = readQuery(request, spec.query)
  if (!query.ok) return query
  const body = await readBody(request, spec.body)
  if (!body.ok) return body
  // The schemas are those of the types, which TypeScript can't follow through "with or without one".
  const asked = { params: address.value, query: query.value, body: body.value.value } as Input<
    P,
    Q,
    B
  >['asked']
  return { ok: true, value: { asked, bodyText: body.value.text } }
}

async function runChange<
  P extends Shape | undefined,
  Q extends z.ZodType | undefined,
  B extends z.ZodType | undefined,
  V extends boolean | undefined,
>(
  request: Request,
  params: unknown,
  spec: ChangeSpec<P, Q, B, V>,
  user: SignedInUser,
  handle: (asked: Asked<P, Q, B> & Own<V>) => Promise<Reply> | Reply,
): Promise<Reply> {
  const version = spec.ifMatch === true ? readIfMatch(request) : undefined
  if (version?.ok === false) return version
  const key = spec.creates === true ? readIdempotencyKey(request) : undefined
  if (key?.ok === false) return key
  const input = await readInput(request, params, spec)
  if (!input.ok) return input

  const later: (() => Promise<void>)[] = []
  const now = new Date()
  const run = (db: Kysely<Database>) =>
    handle({
      request,
      db,
      now,
      ...input.value.asked,
      ifMatch: version?.value as Own<V>['ifMatch'],
      afterwards: (work) => void later.push(work),
    })
  const reply =
    key === undefined
      ? await run(database())
      : await once(
          database(),
          { userId: user.id, key: key.value, request: sameRequest(request, input.value.bodyText), now },
          async (trx) => withoutResponse(await run(trx)),
        )
  if (reply instanceof Response || reply.ok) {
    for (const work of later)
      await work().catch((error: unknown) => log().error({ err: error }, 'afterwards failed'))
  }
  return reply
}

const sameRequest = (request: Request, bodyText: string): string =>
  [request.method, new URL(request.url).pathname, bodyText].join('\n')

function withoutResponse(reply: Reply): Outcome<AnswerValue> {
  if (reply instanceof Response)
    throw new TypeError('a route that creates must answer with a value that can be kept')
  return reply
}

async function withUser(request: Request, work: (user: SignedInUser) => Promise<Reply>): Promise<Reply> {
  const session = await findSession(request.headers, true)
  if (session === undefined) return fail('signed-out', 'Sign in first, then try again.')
  const origin = checkOrigin(request)
  if (!origin.ok) return origin
  const reply = await work(session.user)
  const response = toResponse(reply)
  // What a signed-in person sees stays out of every cache, the browser's "back" included.
  response.headers.set('cache-control', 'no-store')
  for (const cookie of session.setCookies) response.headers.append('set-cookie', cookie)
  return response
}

function toResponse(reply: Reply): Response {
  if (reply instanceof Response) return reply
  return reply.ok ? answerResponse(reply.value) : problemResponse(reply.error)
}

/** Catches what was thrown, once, and logs it once. */
function guarded(work: (request: Request, params: unknown) => Promise<Reply>): RouteHandler {
  return async (request, context) => {
    try {
      // An address without brackets gets no params at all.
      return toResponse(await work(request, (await context.params) ?? {}))
    } catch (error) {
      return problemResponse(await failureOf(error, request))
    }
  }
}

async function failureOf(error: unknown, request: Request): Promise<Failure> {
  const { method } = request
  const path = new URL(request.url).pathname
  if (request.signal.aborted) {
    log().debug({ method, path }, 'the browser went away before its answer')
    return fail('went-wrong').error
  }
  if (isDatabaseAway(error)) {
    log().warn({ method, path, err: error }, 'the database is away')
    return fail('database-away', 'The database can not be reached just now. Try again in a minute.', {
      retryAfterS: 10,
    }).error
  }
  log().error({ method, path, err: error }, 'a request failed')
  return fail('went-wrong', 'Something went wrong here. It is logged; try again.').error
}
