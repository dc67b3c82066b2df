import type { LidOfPiece } from '@/lib/carry/lid-of-piece'
import type { FitCheck, FitCheckInput } from '@/lib/fit/fit-check'
import type { LidPlace, MonthClearance } from '@/lib/fit/lid-place'
import type { Cover, FitGrade } from './piece'

type RoomName = { readonly id: string; readonly name: string; readonly mark: number }

/** A room and where the lid's wood would end in it, given time; no place while it has no fresh reading. */
export type LidRoom = RoomName & {
  readonly place: LidPlace | null
  /** When it was last read, where that is too long ago. */
  readonly readAt: string | null
}

/** A stay that was asked about. */
export type LidStay = {
  readonly room: RoomName
  readonly stayMinutes: number
  readonly cover: Cover
  /** Null: the room has no fresh reading, or nothing is known of the piece's air. */
  readonly place: LidPlace | null
}

/** May the joint be cut now? */
export type CutQuestion =
  | { readonly kind: 'ask-diameter' }
  /** Nothing to judge by: no year of its keep room, or nothing known of its wood. */
  | { readonly kind: 'unknown'; readonly words: string }
  | {
      readonly kind: 'check'
      /** The room whose year it is judged against. */
      readonly against: RoomName
      readonly grade: FitGrade
      readonly input: FitCheckInput
      readonly check: FitCheck
      readonly assumed: readonly string[]
    }

/** How a piece's lid fits: where it was cut, now, in each room given time, after a stay, through its keep room's year. */
export type PieceFit = {
  readonly at: string
  readonly lid: LidOfPiece
  readonly rooms: readonly LidRoom[]
  readonly stay: LidStay | null
  readonly keepRoom: RoomName | null
  readonly isKeepRoomAssumed: boolean
  /** Its keep room's last twelve months, those with a reading. */
  readonly year: readonly MonthClearance[]
  readonly cut: CutQuestion
}
