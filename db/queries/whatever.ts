import type { Kysely } from 'kysely'
import type { Database } from '../schema'

/** A site has no more finished boxes at rest than can be looked at one by one. */
const candidatesMax = 80

/**
 * Pieces that "whatever I take" may be judged by: finished boxes with a joint, at rest. Whether each stands in its keep
 * room is for `whateverJudged` to say, which knows the room that is assumed where none was named.
 */
export async function listWhateverCandidates(db: Kysely<Database>, siteId: number): Promise<number[]> {
  const rows = await db
    .selectFrom('piece')
    .innerJoin('piece_place as place', (join) =>
      join
        .onRef('place.site_id', '=', 'piece.site_id')
        .onRef('place.piece_id', '=', 'piece.id')
        .on('place.to_at', 'is', null),
    )
    .where('piece.site_id', '=', siteId)
    .where('piece.stage', '=', 'box')
    .where('piece.archived_at', 'is', null)
    .where('piece.wood_kind', '=', 'plain')
    .where('piece.joint_diameter_mm', 'is not', null)
    .where('place.carry_id', 'is', null)
    .where((eb) => eb.or([eb('piece.fit_grade', 'is', null), eb('piece.fit_grade', '<>', 'threaded')]))
    .select('piece.id')
    .orderBy('piece.id')
    .limit(candidatesMax)
    .execute()
  return rows.map((row) => row.id)
}
