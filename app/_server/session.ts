import 'server-only'
import { headers } from 'next/headers'
import { notFound, redirect } from 'next/navigation'
import { cache } from 'react'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { may, type Action } from '@/lib/sites/permissions'
import { codeSchema } from '@/lib/sites/site'
import { safeNextPath } from '@/lib/sites/next-path'
import { auth } from './auth'
import { database } from './database'

export interface SignedInUser {
  id: string
  name: string
  email: string
}

export interface FoundSession {
  user: SignedInUser
  /** Cookies to hand on: a session that is used goes on, and the browser has to hear of it. */
  setCookies: string[]
}

/** Who the request's cookie belongs to, asked of the database at every request, so that an ended session is ended at once. */
export async function findSession(
  requestHeaders: Headers,
  refresh: boolean,
): Promise<FoundSession | undefined> {
  if (!requestHeaders.has('cookie')) return undefined
  const found = await auth().api.getSession({
    headers: requestHeaders,
    query: refresh ? {} : { disableRefresh: true },
    returnHeaders: true,
  })
  if (found.response === null) return undefined
  const { id, name, email } = found.response.user
  return { user: { id, name, email }, setCookies: found.headers.getSetCookie() }
}

const sessionOfPage = cache(async () => findSession(await headers(), false))
const memberOfPage = cache((siteCode: string, userId: string) => findSiteMember(database(), siteCode, userId))

/** For pages that show a little more to those who are signed in. */
export async function findUser(): Promise<SignedInUser | undefined> {
  return (await sessionOfPage())?.user
}

/** For server components: the signed-in person, or else on to the sign-in page, which leads back here. */
export async function requireUser(): Promise<SignedInUser> {
  const user = await findUser()
  if (user !== undefined) return user
  const here = safeNextPath((await headers()).get('x-lidfast-path'))
  redirect(here === undefined ? '/sign-in' : `/sign-in?next=${encodeURIComponent(here)}`)
}

/**
 * For server components below `/sites/[site]`: the member, or else the same "not there" page for a site that is missing,
 * one that isn't yours, and a page that your role doesn't see.
 */
export async function requireMember(siteCode: string, action: Action): Promise<SiteMember> {
  const user = await requireUser()
  const isCode = codeSchema.safeParse(siteCode).success
  const member = isCode ? await memberOfPage(siteCode, user.id) : undefined
  if (member === undefined || !may(member.role, action)) notFound()
  return member
}
