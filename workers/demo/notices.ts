import type { Transaction } from 'kysely'
import { insertDemoNotice, type DemoNotice } from '@/db/queries/demo-pieces'
import type { Database } from '@/db/schema'
import { latheCaution, coinCellCaution, tightLidCaution } from '@/lib/notices/wording'
import type { Role } from '@/lib/sites/permissions'
import type { Moment } from './carries'
import type { MadePieces } from './make-pieces'
import type { MadePlace } from './make-place'
import { instantOf } from './moments'
import { placeTimeZone } from './place'

interface PlaceNotice extends Pick<DemoNotice, 'rule' | 'urgency' | 'mark' | 'title' | 'body'> {
  at: Moment
  /** A piece of the carry that it was about, or the instrument. */
  piece?: string
  model?: string
  acknowledged?: { at: Moment; by: Role }
  seenBy: readonly Role[]
  mailedTo: readonly Role[]
}

/** What the place was told in the last weeks. What holds now is left to the notices' own worker. */
const placeNotices: readonly PlaceNotice[] = [
  {
    rule: 'sensor-silent',
    urgency: 'whenever',
    mark: 'silent',
    at: { days: -20, time: '07:00' },
    title: 'Shop, by the door in Shop has gone silent.',
    body: `Its battery was nearly flat. ${coinCellCaution}`,
    model: 'shop-door',
    acknowledged: { at: { days: -20, time: '12:20' }, by: 'maker' },
    seenBy: ['maker', 'owner'],
    mailedTo: ['maker'],
  },
  {
    rule: 'planned-carry',
    urgency: 'soon',
    mark: 'keep-short',
    at: { days: -9, time: '09:00' },
    title: '191 and 195 are down to go to Shop at 10:00: 191 may go; 195 must be back by 11:50.',
    body: 'Put it off, take it bagged or in the shut tub, or make the stay shorter.',
    piece: '195',
    seenBy: ['maker', 'hand'],
    mailedTo: ['maker'],
  },
  {
    rule: 'time-nearly-out',
    urgency: 'now',
    mark: 'keep-short',
    at: { days: -9, time: '11:25' },
    title: `Bring 195 in by 11:50. ${latheCaution}`,
    body: tightLidCaution,
    piece: '195',
    acknowledged: { at: { days: -9, time: '11:40' }, by: 'hand' },
    seenBy: ['maker', 'hand'],
    mailedTo: ['maker', 'hand'],
  },
  {
    rule: 'time-out',
    urgency: 'now',
    mark: 'leave',
    at: { days: -6, time: '17:20' },
    title: `Bring 209 in now: it was due by 17:20. ${latheCaution}`,
    body: tightLidCaution,
    piece: '209',
    acknowledged: { at: { days: -6, time: '18:10' }, by: 'hand' },
    seenBy: ['maker', 'hand', 'owner'],
    mailedTo: ['maker', 'hand'],
  },
  {
    rule: 'lock-up',
    urgency: 'now',
    mark: 'keep-short',
    at: { days: -6, time: '18:00' },
    title: 'Lock-up: still out: 209.',
    body: `One night out there can undo a year of waiting. Bring it in, or say that it is in already. ${latheCaution}`,
    piece: '209',
    acknowledged: { at: { days: -6, time: '18:12' }, by: 'hand' },
    seenBy: ['maker', 'hand'],
    mailedTo: ['maker', 'hand'],
  },
  {
    rule: 'planned-carry',
    urgency: 'soon',
    mark: 'leave',
    at: { days: -3, time: '19:00' },
    title: '193 is down to go to Shop tomorrow at 14:00: 193 should stay where it is.',
    body: 'A suction lid loses its sigh long before it binds. Put it off, or take it bagged.',
    piece: '193',
    seenBy: ['hand'],
    mailedTo: ['maker', 'hand'],
  },
]

export async function makeNotices(
  trx: Transaction<Database>,
  place: MadePlace,
  { pieces, carries }: MadePieces,
  now: Date,
): Promise<void> {
  const at = (moment: Moment) => instantOf(moment, now, placeTimeZone)
  for (const notice of placeNotices) {
    const { piece: number, model, acknowledged } = notice
    const carry = carries.find(
      (one) => one.endedAt !== null && number !== undefined && one.pieces.includes(number),
    )
    const sensor = model === undefined ? undefined : place.sensors.get(model)
    await insertDemoNotice(trx, place.siteId, {
      ...notice,
      at: at(notice.at),
      link: carry ? `/carry/${carry.code}` : sensor ? `/sensors/${sensor.code}` : '',
      carryId: carry?.id,
      pieceId: number === undefined ? undefined : pieces.get(number)?.id,
      sensorId: sensor?.id,
      acknowledged: acknowledged && { at: at(acknowledged.at), userId: place.users[acknowledged.by] },
      seenBy: notice.seenBy.map((role) => place.users[role]),
      mailedTo: notice.mailedTo.map((role) => place.users[role]),
    })
  }
}
