import { assumedKeepRoom } from '@/db/queries/carry-inputs'
import type { RoomRecord } from '@/db/queries/rooms'
import type { CarryMaterial } from '@/lib/carry/material'
import { hourStrip } from '@/lib/forecast/hour-strip'
import type { StripCell } from '@/lib/forecast/strip-view'
import type { NoticeStrip, StripKind } from '@/lib/notices/surroundings'

/**
 * The coming hours of each shop by its forecast, judged by a typical box as on the room's page: nobody has chosen pieces,
 * and by the least forgiving box of a whole shelf hardly an hour of the year is fit. A shop without a forecast is left out.
 */
export function stripsOf(
  material: CarryMaterial,
  rooms: readonly RoomRecord[],
  timeZone: string,
): NoticeStrip[] {
  const keepRoomId = assumedKeepRoom(rooms)?.id ?? null
  return rooms
    .filter(({ kind }) => kind === 'shop')
    .flatMap((room): NoticeStrip[] => {
      const strip = hourStrip(material, { roomId: room.id, pieceIds: [], keepRoomId, timeZone })
      if (strip.kind !== 'forecast') return []
      const cells = strip.cells.map((cell) => ({ at: new Date(cell.at).getTime(), kind: kindOf(cell) }))
      return [{ roomCode: room.code, roomName: room.name, cells }]
    })
}

const kindOf = ({ state, ifLit }: StripCell): StripKind =>
  state !== 'fit' && ifLit?.state === 'fit' ? 'fit-if-lit' : state
