import type { Kysely } from 'kysely'
import { addStrayCounts, type StrayKind } from '@/db/queries/ingest-counts'
import type { Database } from '@/db/schema'
import { beat } from '../_shared/heartbeat'

export interface Pulse {
  count(kind: StrayKind): void
  /** Says that the broker is alive, and adds what was counted since the last time. */
  beat(): Promise<void>
}

/** What the broker tells of itself. Strangers are counted here in memory: none of them is worth a write of its own. */
export function createPulse(
  db: Kysely<Database>,
  now: () => Date,
  detail: () => Record<string, unknown>,
): Pulse {
  const counts = new Map<StrayKind, number>()
  return {
    count: (kind) => void counts.set(kind, (counts.get(kind) ?? 0) + 1),
    async beat() {
      await beat(db, 'broker', now(), detail())
      const sent = new Map(counts)
      await addStrayCounts(db, sent, now())
      for (const [kind, n] of sent) counts.set(kind, (counts.get(kind) ?? 0) - n)
      for (const [kind, n] of counts) if (n === 0) counts.delete(kind)
    },
  }
}
