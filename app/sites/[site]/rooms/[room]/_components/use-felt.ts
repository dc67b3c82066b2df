'use client'

import { parseAsString, useQueryStates } from 'nuqs'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import type { RoomFelt } from '@/lib/rooms/felt'
import { type FeltAsked, feltAskedOf, feltQueryOf } from './felt-asked'

export type InitialFelt = { asked: FeltAsked; felt: RoomFelt }

/** What wood has felt of a room; which wood, and which thickness beside the usual three, stand in the address. */
export function useFelt(site: string, roomId: string, initial: InitialFelt | undefined) {
  const [given, setGiven] = useQueryStates({ wood: parseAsString, thicknessMm: parseAsString })
  const asked = feltAskedOf(given.wood, given.thicknessMm)
  const isInitial = initial?.asked.wood === asked.wood && initial.asked.ownMm === asked.ownMm
  const query = useSiteQuery<RoomFelt>({
    site,
    area: 'rooms',
    key: [roomId, 'felt', asked.wood, asked.ownMm],
    path: `/rooms/${roomId}/felt?${new URLSearchParams(feltQueryOf(asked)).toString()}`,
    initial: isInitial ? initial.felt : undefined,
    keepLast: true,
  })
  return {
    query,
    asked,
    setWood: (wood: string | null) => void setGiven({ wood }),
    setOwnMm: (ownMm: number | null) => void setGiven({ thicknessMm: ownMm === null ? null : String(ownMm) }),
  }
}
