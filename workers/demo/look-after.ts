import { access } from 'node:fs/promises'
import type { Kysely } from 'kysely'
import { isAnySiteThere, listDemoSites, wasAnySiteThere } from '@/db/queries/demo'
import { deleteSite, deleteUsersWithoutSite } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import { demoAccounts } from '@/lib/sites/demo'
import { makeDemo, type DemoOptions } from './make-demo'
import { renewRoster } from './renew-roster'
import { removeRoster, rosterFile, writeRoster } from './roster'

export interface LookAfterOptions extends Omit<DemoOptions, 'keepRoster'> {
  dataDir: string
  /** Takes the demo away first; nothing else. */
  isReset: boolean
}

/**
 * Makes the demo when no site is there, makes one anew that was not finished, and gives a demo whose sensors lost
 * their secrets new ones.
 */
export async function lookAfterDemo(db: Kysely<Database>, options: LookAfterOptions): Promise<void> {
  const { dataDir, isReset, now, say } = options
  const demos = await listDemoSites(db)
  const toRemove = demos.filter((one) => isReset || !one.isComplete)
  for (const demo of toRemove) {
    say(isReset ? 'Removing the demo' : 'Removing a demo that was not finished')
    await removeDemo(db, demo.id, now)
    await removeRoster(dataDir)
  }
  const kept = isReset ? undefined : demos.find((one) => one.isComplete)
  if (kept !== undefined) {
    if (!(await isThere(rosterFile(dataDir)))) await writeRoster(dataDir, await renewRoster(db, kept, now))
    return say('The demo is there.')
  }
  if (!isReset && (await isAnySiteThere(db))) return say('There are sites already, so no demo is made.')
  if (!isReset && toRemove.length === 0 && (await wasAnySiteThere(db)))
    return say('The demo was taken away. `npm start -- --reset-demo` makes it anew.')
  const began = performance.now()
  await makeDemo(db, { ...options, keepRoster: (roster) => writeRoster(dataDir, roster) })
  say(`The demo is made, in ${((performance.now() - began) / 1000).toFixed(1)} s.`)
}

async function removeDemo(db: Kysely<Database>, siteId: number, now: Date): Promise<void> {
  await db.transaction().execute(async (trx) => {
    await deleteSite(trx, siteId, now)
    // Their password is known to everybody; but one who belongs to another site by now is left alone.
    await deleteUsersWithoutSite(
      trx,
      demoAccounts.map(({ email }) => email),
    )
  })
}

const isThere = (file: string): Promise<boolean> =>
  access(file).then(
    () => true,
    () => false,
  )
