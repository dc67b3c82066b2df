import type { Kysely } from 'kysely'
import type { Database } from '../schema'

export interface NewChange {
  userId: string
  subjectKind: string
  subjectCode: string
  action: string
  /** The changed fields only, before and after, so that the change can be undone. */
  before?: Record<string, unknown>
  after?: Record<string, unknown>
}

/** Records who changed what. Call it in the transaction of the change itself. */
export async function insertChange(db: Kysely<Database>, siteId: number, change: NewChange): Promise<void> {
  await db
    .insertInto('change')
    .values({
      site_id: siteId,
      user_id: change.userId,
      subject_kind: change.subjectKind,
      subject_code: change.subjectCode,
      action: change.action,
      before: change.before === undefined ? null : JSON.stringify(change.before),
      after: change.after === undefined ? null : JSON.stringify(change.after),
    })
    .execute()
}

/** The fields of `after` that differ from `before`, as the pair that `insertChange` stores. */
export function changedFields<T extends Record<string, unknown>>(
  before: T,
  after: Partial<T>,
): { before: Record<string, unknown>; after: Record<string, unknown> } {
  const names = Object.keys(after).filter((name) => after[name] !== undefined && after[name] !== before[name])
  const pick = (from: Partial<T>) => Object.fromEntries(names.map((name) => [name, from[name] ?? null]))
  return { before: pick(before), after: pick(after) }
}
