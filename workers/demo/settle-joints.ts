import type { Transaction } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { updateDemoJoint } from '@/db/queries/demo-pieces'
import type { Database } from '@/db/schema'
import { carryCheckInput } from '@/lib/carry/material'
import type { ScenarioName } from '@/lib/sensors/scenarios'
import { outMinutes } from './carries'
import { chosenJoint, type WantedEdge } from './choose-joints'
import type { MadePieces } from './make-pieces'
import type { MadePlace } from './make-place'
import { placeTimeZone } from './place'

/** For each box with a part in today's story, when the early edge of its outing should come, minutes after its start. */
const wantedEdges: Readonly<Record<string, WantedEdge>> = {
  // Out, and due within the hour.
  '207': {
    least: outMinutes.nearlyDue + 15,
    aim: outMinutes.nearlyDue + 30,
    most: outMinutes.nearlyDue + 50,
  },
  // Out, and good for hours.
  '221': { least: outMinutes.fine + 180, aim: outMinutes.fine + 330, most: Infinity },
  // Out, and overdue since an hour or two.
  '203': { least: 60, aim: outMinutes.overdue - 110, most: outMinutes.overdue - 60 },
  // Planned within the hour: it should stay where it is.
  '219': { least: 4, aim: 15, most: 24 },
  // In the same carry: to be kept short.
  '214': { least: 60, aim: 120, most: 190 },
  // Planned for tomorrow, bagged: fine.
  '205': { least: 170, aim: 600, most: Infinity },
}

/** Where a verdict is to turn worse, both may still go, and only just: the air that comes makes them stay. */
const onTheBrink = { least: 34, aim: 42, most: 55 }

/**
 * Settles how fine the fit of those boxes is, by the very check that will judge them, so that the story holds in any
 * season and at any hour.
 * @returns the numbers of pieces for which no joint was found that does
 */
export async function settleJoints(
  trx: Transaction<Database>,
  place: MadePlace,
  { pieces, carries }: MadePieces,
  now: Date,
  scenario?: ScenarioName,
): Promise<string[]> {
  const wantedOf = (number: string, wanted: WantedEdge): WantedEdge =>
    scenario === 'verdict-worse' && (number === '219' || number === '214') ? onTheBrink : wanted
  const numbers = Object.keys(wantedEdges)
  const ids = numbers.flatMap((number) => pieces.get(number)?.id ?? [])
  const site = { siteId: place.siteId, timeZone: placeTimeZone }
  const material = await loadCarryMaterial(trx, site, ids, [place.rooms.shop], now)
  const unsettled: string[] = []
  for (const [number, wanted] of Object.entries(wantedEdges)) {
    const piece = pieces.get(number)
    const carry = carries.find((one) => one.pieces.includes(number) && one.endedAt === null)
    const input =
      piece &&
      carry &&
      carryCheckInput(material, {
        pieceId: piece.id,
        toRoomId: place.rooms[carry.to],
        startsAt: carry.startedAt ?? carry.plannedAt,
        stayMinutes: carry.stayMinutes,
        cover: carry.cover,
      })
    if (piece === undefined || input === undefined) throw new RangeError(`no open carry of ${number}`)
    const { joint, isAsWanted } = chosenJoint(input, wantedOf(number, wanted))
    await updateDemoJoint(trx, place.siteId, piece.id, joint)
    if (!isAsWanted) unsettled.push(number)
  }
  return unsettled
}
