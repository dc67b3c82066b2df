import 'server-only'
import type { PieceCheck } from '@/lib/carry/carry-check'
import type { SiteMember } from '@/db/queries/members'
import type { PieceRecord, Viewer } from '@/db/queries/pieces'
import type { Piece } from '@/lib/pieces/piece'
import { pieceTitle, woodName } from '@/lib/pieces/title'

export const viewerOf = (member: SiteMember): Viewer => ({ userId: member.userId, role: member.role })

type ShownRoom = { id: string; name: string; mark: number } | null

/** A room beside a piece. Onlookers hear of shared rooms only. */
export const shownRoom = (room: PieceRecord['room'], member: SiteMember): ShownRoom =>
  room === null || (member.role === 'onlooker' && !room.isShared)
    ? null
    : { id: room.code, name: room.name, mark: room.mark }

/** One line of the list. Of a private piece others see its number, room and time out, and nothing else. */
export function pieceView(piece: PieceRecord, member: SiteMember): Piece {
  const isOnlooker = member.role === 'onlooker'
  const seen = {
    id: piece.code,
    number: piece.number,
    title: pieceTitle(piece),
    room: shownRoom(piece.room, member),
    cover: piece.cover,
    since: isOnlooker ? null : (piece.since?.toISOString() ?? null),
    isOut: piece.isOut,
    version: piece.version,
    isHidden: piece.isHidden,
  }
  if (piece.isHidden)
    return {
      ...seen,
      stage: 'box',
      wood: null,
      woodName: '',
      woodKind: 'plain',
      jointDiameterMm: null,
      fitGrade: null,
      keepRoom: null,
    }
  return {
    ...seen,
    stage: piece.stage,
    wood: piece.wood,
    woodName: woodName(piece),
    woodKind: piece.woodKind,
    jointDiameterMm: piece.jointDiameterMm,
    fitGrade: piece.fitGrade,
    keepRoom: shownRoom(piece.keepRoom, member),
  }
}

/** A verdict without the sizes and the wood that it rests on: how long it may stay, and nothing of why. */
export function hiddenCheck(check: PieceCheck): PieceCheck {
  if (check.kind === 'verdict')
    return {
      ...check,
      reason: '',
      second: '',
      assumed: [],
      ringMcPct: null,
      lidMcPct: null,
      mcDoubtPct: null,
      cutMcPct: null,
      changePct: null,
      allowedMcPct: null,
      lossMm: null,
      allowanceMm: null,
      curve: null,
    }
  if (check.kind === 'words')
    return { ...check, reason: 'no-joint', words: 'Private to its maker.', second: '' }
  return check
}
