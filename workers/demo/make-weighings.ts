import type { Transaction } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { insertPieceEvent } from '@/db/queries/piece-events'
import { loadRestInputs } from '@/db/queries/rest-inputs'
import { rememberScaleStep } from '@/db/queries/sites'
import { insertWeighing } from '@/db/queries/weighings'
import type { Database } from '@/db/schema'
import type { MadePieces } from './make-pieces'
import type { MadePlace } from './make-place'
import { daysBefore } from './moments'
import { placeTimeZone } from './place'
import { type PlaceWeighings, placeScaleStepG, placeWeighings, weightsOf } from './weighings'

const hourMs = 3_600_000

/** Gives the resting pieces of the place their weights, made through the air of its own rooms. */
export async function makeWeighings(
  trx: Transaction<Database>,
  place: MadePlace,
  { pieces }: MadePieces,
  now: Date,
): Promise<void> {
  const site = { siteId: place.siteId, timeZone: placeTimeZone }
  await rememberScaleStep(trx, place.siteId, placeScaleStepG)
  const ids = placeWeighings.flatMap(({ number }) => pieces.get(number)?.id ?? [])
  const material = await loadCarryMaterial(trx, site, ids, [], now)
  for (const story of placeWeighings) {
    const pieceId = pieces.get(story.number)?.id
    const own = pieceId === undefined ? undefined : material.pieces.get(pieceId)
    if (pieceId === undefined || own === undefined) throw new RangeError(`no piece ${story.number} to weigh`)
    const { courseThrough, target } = await loadRestInputs(trx, site, pieceId, own, now)
    // Without a record of its keep room there is nothing that it could end at.
    if (target === undefined) continue
    const driftAt = courseThrough(undefined)?.driftAt ?? (() => undefined)
    await insertAll(trx, place, pieceId, story, weightsOf(story, target.pct, driftAt, now), now)
  }
}

async function insertAll(
  trx: Transaction<Database>,
  place: MadePlace,
  pieceId: number,
  story: PlaceWeighings,
  weights: readonly { at: Date; grams: number }[],
  now: Date,
): Promise<void> {
  const userId = place.users.maker
  const shared = { pieceId, roomId: place.rooms.cupboard, userId }
  const firstAt = weights[0]?.at
  if (story.isDryMassTold && firstAt !== undefined)
    await insertPieceEvent(
      trx,
      place.siteId,
      {
        ...shared,
        kind: 'oven-dry',
        at: new Date(firstAt.getTime() - hourMs),
        data: { ovenDryG: story.dryG },
        note: 'From an offcut of the same log.',
      },
      now,
    )
  if (story.cut !== undefined)
    await insertPieceEvent(
      trx,
      place.siteId,
      { ...shared, kind: 'cut', at: daysBefore(now, story.cut.daysAgo), data: {}, note: 'Rim trued up.' },
      now,
    )
  for (const { at, grams } of weights)
    await insertWeighing(
      trx,
      place.siteId,
      { pieceId, at, grams, stepG: placeScaleStepG, note: '', userId },
      at,
    )
}
