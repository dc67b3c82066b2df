import { type Kysely, sql } from 'kysely'
import type { Measured } from '@/lib/follow/record'
import { eventDataSchema } from '@/lib/pieces/event'
import type { Database } from '../schema'

/** Doubt of a moisture meter well used, and of a weight over its oven-dry mass, ± % MC. Source: Wood Handbook
 * (FPL-GTR-190, 2010), p. 13-3 (meters, within 1 %); weights: guess. */
const meterDoubtPct = 1
const weightDoubtPct = 0.3

/**
 * Moisture contents of pieces that were measured, oldest first: meter readings, and weights where the oven-dry mass is
 * known from an oven or from a weight with a meter reading, until something adds or takes mass.
 */
export async function listMeasured(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
): Promise<Map<number, Measured[]>> {
  const measured = new Map<number, Measured[]>()
  if (pieceIds.length === 0) return measured
  const [events, weighings] = await Promise.all([
    db
      .selectFrom('piece_event')
      .where('site_id', '=', siteId)
      .where(sql<boolean>`piece_id = any(${[...pieceIds]}::int[])`)
      .where('undone_at', 'is', null)
      .where('kind', '<>', 'note')
      .select(['piece_id', 'kind', 'at', 'data'])
      .orderBy('at')
      .execute(),
    db
      .selectFrom('weighing')
      .where('site_id', '=', siteId)
      .where(sql<boolean>`piece_id = any(${[...pieceIds]}::int[])`)
      .where('undone_at', 'is', null)
      .select(['piece_id', 'at', 'grams'])
      .orderBy('at')
      .execute(),
  ])
  for (const pieceId of pieceIds) {
    const own = measuredOf(
      events.filter((event) => event.piece_id === pieceId),
      weighings.filter((weighing) => weighing.piece_id === pieceId),
    )
    if (own.length > 0) measured.set(pieceId, own)
  }
  return measured
}

function measuredOf(
  events: readonly { kind: string; at: Date; data: unknown }[],
  weighings: readonly { at: Date; grams: number }[],
): Measured[] {
  const measured: Measured[] = []
  let ovenDryG: number | undefined
  const steps = [
    ...events.map((event) => ({ at: event.at, event, grams: null })),
    ...weighings.map(({ at, grams }) => ({ at, event: null, grams })),
  ].toSorted((one, other) => one.at.getTime() - other.at.getTime())
  for (const { at, event, grams } of steps) {
    if (event === null) {
      if (ovenDryG !== undefined)
        measured.push({
          at: at.getTime(),
          mcPct: within((100 * (grams - ovenDryG)) / ovenDryG),
          doubtPct: weightDoubtPct,
        })
      continue
    }
    const data = eventDataSchema.safeParse(event.data)
    const { mcPct, ovenDryG: dry } = data.success ? data.data : {}
    if (event.kind === 'meter' && mcPct !== undefined)
      measured.push({ at: at.getTime(), mcPct, doubtPct: meterDoubtPct })
    // Whatever adds or takes mass ends what weights can say, until the oven-dry mass is known anew.
    ovenDryG = event.kind === 'oven-dry' ? dry : event.kind === 'meter' ? ovenDryG : undefined
  }
  return measured
}

const within = (mcPct: number): number => Math.min(30, Math.max(0, mcPct))
