import 'server-only'
import type { Kysely } from 'kysely'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { findSettings, lockSettings, saveSettings } from '@/db/queries/own-settings'
import { findSiteCode } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import { readLink } from '@/db/signed-link'
import { channelsFor } from '@/lib/notices/own-settings'
import type { Rule } from '@/lib/notices/notice'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { notThere, type Outcome } from './problem'

export interface UnsubscribeView {
  siteName: string
  /** Null: every mail of the site. */
  rule: Rule | null
  isOff: boolean
}

async function loadLink(
  db: Kysely<Database>,
  token: string,
): Promise<{ member: SiteMember; rule: Rule | null } | undefined> {
  const link = readLink(serverConfig().authSecret, token)
  if (link?.kind !== 'unsubscribe') return undefined
  const siteCode = await findSiteCode(db, link.siteId)
  const member = siteCode === undefined ? undefined : await findSiteMember(db, siteCode, link.userId)
  return member === undefined ? undefined : { member, rule: link.rule }
}

const isOff = async (db: Kysely<Database>, member: SiteMember, rule: Rule | null): Promise<boolean> => {
  const settings = await findSettings(db, member.siteId, member.userId)
  return rule === null ? !settings.mailOn : !channelsFor(settings, rule).mailOn
}

/** What a link would end, without ending it: programs open links by themselves. */
export async function lookAtUnsubscribe(
  db: Kysely<Database>,
  token: string,
): Promise<UnsubscribeView | undefined> {
  const found = await loadLink(db, token)
  if (found === undefined) return undefined
  const { member, rule } = found
  return { siteName: member.site.name, rule, isOff: await isOff(db, member, rule) }
}

/** Ends the mails of a rule, or all of a site, for the person that the link was sent to. Pressed twice, they stay ended. */
export async function unsubscribe(db: Kysely<Database>, token: string): Promise<Outcome<UnsubscribeView>> {
  const found = await loadLink(db, token)
  if (found === undefined) return notThere()
  const { member, rule } = found
  await db.transaction().execute(async (trx) => {
    await lockSettings(trx, member.siteId, member.userId)
    if (await isOff(trx, member, rule)) return
    const settings = await findSettings(trx, member.siteId, member.userId)
    const change =
      rule === null
        ? // Rules that were chosen for themselves would go on.
          { mailOn: false, rules: withoutMail(settings.rules) }
        : { rules: { [rule]: { ...channelsFor(settings, rule), mailOn: false } } }
    await saveSettings(trx, member.siteId, member.userId, change)
  })
  return ok({ siteName: member.site.name, rule, isOff: true })
}

const withoutMail = (rules: Partial<Record<Rule, { mailOn: boolean; pushOn: boolean }>>) =>
  Object.fromEntries(Object.entries(rules).map(([rule, channels]) => [rule, { ...channels, mailOn: false }]))
