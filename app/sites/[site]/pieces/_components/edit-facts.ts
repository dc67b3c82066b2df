import { type PieceChange, pieceChangeSchema, type PieceDetail } from '@/lib/pieces/piece'

/** The facts of a piece as the form holds them: what may be changed, and nothing else. */
export const factsOf = (piece: PieceDetail): PieceChange => ({
  number: piece.number,
  stage: piece.stage,
  wood: piece.wood,
  woodKind: piece.woodKind,
  grain: piece.grain,
  spigotOn: piece.spigotOn,
  lidForm: piece.lidForm,
  jointDiameterMm: piece.jointDiameterMm,
  wallMm: piece.wallMm,
  spigotMm: piece.spigotMm,
  lidMm: piece.lidMm,
  bodyWallMm: piece.bodyWallMm,
  lidWallMm: piece.lidWallMm,
  blankDiameterMm: piece.blankDiameterMm,
  endsSealed: piece.endsSealed,
  roughedOn: piece.roughedOn,
  isReadyByWeight: piece.isReadyByWeight,
  fitGrade: piece.fitGrade,
  clearanceMm: piece.clearanceMm,
  allowanceMm: piece.allowanceMm,
  finish: piece.finish,
  keepRoomId: piece.keepRoom?.id ?? null,
  fittedRoomId: piece.fittedRoomId,
  fittedOn: piece.fittedOn,
  note: piece.note,
  isPrivate: piece.isPrivate,
  isShared: piece.isShared,
})

/** Only what differs, so that a fact that someone else sees to is not written over with an old value. */
export function changeOf(before: PieceChange, after: PieceChange): PieceChange {
  const kept: Readonly<Record<string, unknown>> = before
  return pieceChangeSchema.parse(
    Object.fromEntries(Object.entries(after).filter(([field, value]) => kept[field] !== value)),
  )
}
