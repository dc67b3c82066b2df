import 'server-only'
import type { Kysely } from 'kysely'
import { changedFields, insertChange } from '@/db/queries/changes'
import { takeIds } from '@/db/queries/counters'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import {
  findSiteWood,
  insertSiteWood,
  isWoodNameTaken,
  type SiteWoodRecord,
  type SiteWoodValues,
  updateSiteWood,
} from '@/db/queries/site-woods'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import {
  type NewSiteWood,
  ownWoodCode,
  ownWoodId,
  type SiteWoodChange,
  wrongFigures,
} from '@/lib/wood/site-wood'
import { findSpecies, SPECIES } from '@/lib/wood/species'
import type { Wood } from '@/lib/wood/wood'
import { fail, failField, notThere, type Outcome } from './problem'
import { getWood } from './woods'

const slugOf = (wood: SiteWoodRecord): string => wood.overrides ?? ownWoodId(wood.code)

/** What is stored: of a wood of the table the names are the table's, so that the row can be read by itself. */
function valuesOf(input: NewSiteWood): SiteWoodValues | undefined {
  const { overrides, commonName = '', latinName = '', movementClass, ...figures } = input
  if (overrides === null)
    return { overrides, commonName, latinName, movementClass: movementClass ?? 'medium', ...figures }
  const species = findSpecies(overrides)
  if (species === undefined) return undefined
  return {
    overrides,
    commonName: species.commonName,
    latinName: species.latinName,
    movementClass: movementClass ?? species.movementClass,
    ...figures,
  }
}

/** A wood of the site's own, or its figures for one of the table. */
export async function createWood(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewSiteWood,
  now: Date,
): Promise<Outcome<Wood>> {
  return inTransaction(db, async (trx) => {
    // Holding the row of numbers makes two who choose the same name wait for one another.
    await takeIds(trx, member.siteId, 'wood', 0)
    const values = valuesOf(input)
    if (values === undefined)
      return failField('not-possible', 'overrides', 'not in the table of woods: make it a wood of your own')
    const refusal = await refusedNew(trx, member.siteId, values)
    if (refusal !== undefined) return refusal
    const wood = await insertSiteWood(trx, member.siteId, values, now)
    await logAndTell(trx, member, wood, { action: 'create', after: { ...values } })
    return getWood(trx, member, slugOf(wood))
  })
}

async function refusedNew(db: Kysely<Database>, siteId: number, values: SiteWoodValues) {
  if (values.overrides === null) return refusedName(db, siteId, values.commonName)
  const there = await findSiteWood(db, siteId, values.overrides)
  return there === undefined
    ? undefined
    : fail('already-done', `There are figures of your own for ${values.commonName} already: change those.`)
}

async function refusedName(db: Kysely<Database>, siteId: number, commonName: string, butFor?: number) {
  const lower = commonName.toLowerCase()
  if (SPECIES.some((species) => species.commonName.toLowerCase() === lower))
    return failField(
      'name-taken',
      'commonName',
      'the table has a wood of this name: give your own figures for that one instead',
    )
  return (await isWoodNameTaken(db, siteId, commonName, butFor))
    ? failField('name-taken', 'commonName', 'another of your woods has this name')
    : undefined
}

/** Finds the site's row for a change, with its row locked. A wood of the table without own figures has none. */
async function rowToChange(
  db: Kysely<Database>,
  member: SiteMember,
  wood: string,
): Promise<Outcome<SiteWoodRecord>> {
  await takeIds(db, member.siteId, 'wood', 0)
  const row = await findSiteWood(db, member.siteId, wood, { forUpdate: true })
  if (row !== undefined) return ok(row)
  return ownWoodCode(wood) === undefined && findSpecies(wood) !== undefined
    ? fail('not-possible', 'This wood stands as the table has it. Give figures of your own for it first.')
    : notThere()
}

export async function changeWood(
  db: Kysely<Database>,
  member: SiteMember,
  wood: string,
  version: number,
  change: SiteWoodChange,
): Promise<Outcome<Wood>> {
  return inTransaction(db, async (trx) => {
    const found = await rowToChange(trx, member, wood)
    if (!found.ok) return found
    const row = found.value
    if (row.version !== version) return changedMeanwhile(trx, member, row)
    const refusal = await refusedChange(trx, member.siteId, row, change)
    if (refusal !== undefined) return refusal
    await updateSiteWood(trx, member.siteId, row.id, version, change)
    await logAndTell(trx, member, row, { action: 'change', ...changedFields({ ...row }, { ...change }) })
    return getWood(trx, member, wood)
  })
}

async function refusedChange(
  db: Kysely<Database>,
  siteId: number,
  row: SiteWoodRecord,
  change: SiteWoodChange,
) {
  const name = (['commonName', 'latinName'] as const).find((one) => change[one] !== undefined)
  if (row.overrides !== null && name !== undefined)
    return failField('not-possible', name, 'a wood of the table keeps its name')
  const wrong = wrongFigures({
    radialPerPct: change.radialPerPct === undefined ? row.radialPerPct : change.radialPerPct,
    tangentialPerPct: change.tangentialPerPct === undefined ? row.tangentialPerPct : change.tangentialPerPct,
  })
  if (wrong !== undefined) return failField('not-possible', wrong.path, wrong.message)
  return change.commonName === undefined ? undefined : refusedName(db, siteId, change.commonName, row.id)
}

/** Puts a wood away: it isn't offered any more, and pieces made of it keep it. Own figures of the table's stop counting. */
export async function archiveWood(
  db: Kysely<Database>,
  member: SiteMember,
  wood: string,
  version: number,
  now: Date,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const found = await rowToChange(trx, member, wood)
    if (!found.ok) return found
    const row = found.value
    if (row.version !== version) return changedMeanwhile(trx, member, row)
    await updateSiteWood(trx, member.siteId, row.id, version, { archivedAt: now })
    await logAndTell(trx, member, row, { action: 'archive' })
    return ok(undefined)
  })
}

/** Brings out again what was put away, unless another has its name, or other figures stand, by now. */
export async function restoreWood(
  db: Kysely<Database>,
  member: SiteMember,
  wood: string,
): Promise<Outcome<Wood>> {
  return inTransaction(db, async (trx) => {
    await takeIds(trx, member.siteId, 'wood', 0)
    const row = await findSiteWood(trx, member.siteId, wood, { withArchived: true, forUpdate: true })
    if (row === undefined) return notThere()
    if (row.isArchived) {
      const refusal =
        row.overrides === null ? await refusedName(trx, member.siteId, row.commonName, row.id) : undefined
      if (refusal !== undefined) return refusal
      await updateSiteWood(trx, member.siteId, row.id, row.version, { archivedAt: null })
      await logAndTell(trx, member, row, { action: 'restore' })
    }
    return getWood(trx, member, wood)
  })
}

async function logAndTell(
  db: Kysely<Database>,
  member: SiteMember,
  wood: SiteWoodRecord,
  change: { action: string; before?: Record<string, unknown>; after?: Record<string, unknown> },
): Promise<void> {
  await insertChange(db, member.siteId, {
    userId: member.userId,
    subjectKind: 'wood',
    subjectCode: wood.code,
    ...change,
  })
  await notifySite(db, member.siteId, 'wood', slugOf(wood))
}

async function changedMeanwhile(db: Kysely<Database>, member: SiteMember, row: SiteWoodRecord) {
  const current = await getWood(db, member, slugOf(row))
  return fail('changed-meanwhile', 'Somebody changed this wood meanwhile. Look at it again.', {
    current: current.ok ? current.value : undefined,
    version: row.version,
  })
}
