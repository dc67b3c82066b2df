import { jointOfPiece, woodOfPiece } from '@/lib/carry/joint-defaults'
import type { PieceFacts } from '@/lib/carry/carry-check'
import { formatEmc } from '@/lib/format/figures'
import { DUST_ALWAYS, dustNote } from '@/lib/wood/dust'
import { protectedNote, protectedWords } from '@/lib/wood/protected'
import { isOilyWood } from '@/lib/wood/site-wood'
import type { PieceDetail } from './piece'
import { latinSlugOfPiece, type NamedWood, pieceTitle } from './title'

export type McNow = NonNullable<PieceDetail['mc']>

export interface PieceForWords extends PieceFacts {
  ownWood?: NamedWood['ownWood']
  roomName: string | null
  isOut: boolean
  archivedAt: Date | null
  mc: McNow | null
  /** Where a blank or a roughed piece stands, in words; left out where it is not to be told. */
  restWords?: string | undefined
}

/** One sentence of where it stands and what to do next. */
export function pieceHeadline(piece: PieceForWords): string {
  const title = pieceTitle(piece)
  const where = piece.roomName === null ? '' : ` in ${piece.roomName}`
  if (piece.archivedAt !== null) return `${title} ${piece.number} has been put away.`
  if (piece.isOut) return `${title} ${piece.number} is out${where}: bring it back by the time on its carry.`
  if (piece.stage !== 'box')
    return `${title} ${piece.number} rests${where}. ${piece.restWords ?? 'Weigh it to know when it is ready.'}`
  if (piece.woodKind === 'wild')
    return `${title} ${piece.number}${where} moves its own way: fit it easy, test it.`
  if (piece.woodKind === 'stabilised')
    return `${title} ${piece.number}${where}: not worked out to move; its plain parts do.`
  if (piece.fitGrade === 'threaded') return `${title} ${piece.number}${where}: threads aren't worked out.`
  if (piece.jointDiameterMm === null)
    return `Measure the joint of ${piece.number}: then its fit can be worked out.`
  return boxHeadline(title, piece, where)
}

function boxHeadline(title: string, { mc, number }: PieceForWords, where: string): string {
  if (mc === null) return `${title} ${number}${where}: nothing is known yet of the air that it was in.`
  const at = `at about ${formatEmc(mc.ringMcPct)}${where}`
  if (mc.usedFraction === null) return `${title} ${number} is ${at}.`
  if (mc.usedFraction >= 1)
    return `${title} ${number}, ${at}, has moved past what its joint may lose. Turn the lid by quarters: tight, easy, tight, easy. Never force it.`
  if (mc.usedFraction >= 0.5)
    return `${title} ${number}, ${at}, has ${String(Math.round(mc.usedFraction * 20) * 5)}\u00a0% of its allowance used: check before it goes out.`
  return `${title} ${number} keeps its fit, ${at}.`
}

/** What was not told and is taken as usual. */
export function assumedWords(
  facts: PieceFacts,
  taken: { keepRoomName: string | null; isCutAssumed: boolean },
): string[] {
  const isReckoned = facts.stage === 'box' && facts.woodKind === 'plain'
  const joint = isReckoned && facts.fitGrade !== 'threaded' ? jointOfPiece(facts) : undefined
  const sizes = joint?.assumed ?? (isReckoned ? woodOfPiece(facts).assumed : [])
  return [
    ...sizes,
    ...(taken.keepRoomName === null ? [] : [`kept to match ${taken.keepRoomName}`]),
    ...(taken.isCutAssumed && isReckoned ? ['joint cut at its present moisture'] : []),
  ]
}

/** Dust and allergy notes; the general line stands first and always. */
export function pieceDust(piece: NamedWood): PieceDetail['dust'] {
  const wood = latinSlugOfPiece(piece)
  const always = { text: DUST_ALWAYS, source: "HSE Woodworking Sheet WIS30 'Toxic woods', general text" }
  const note = wood === null ? undefined : dustNote(wood)
  if (note === undefined) return [always]
  return [always, { text: `${note.kind}: ${note.effect}`, source: `${note.source} (${note.status})` }]
}

export function pieceCautions(piece: NamedWood & { finish: string; stage: string }): string[] {
  const wood = latinSlugOfPiece(piece)
  const cautions: string[] = []
  if (piece.stage === 'box')
    cautions.push(
      'A swollen lid is never forced, levered or heated: line the grain up, keep the parts side by side, try it cold in about two days. It usually comes back, not always.',
    )
  if (/oil|wax|varnish|lacquer|shellac/i.test(piece.finish))
    cautions.push(
      'Oily rags can catch fire by themselves: lay them flat outside, or under water (NFPA, HSE; local rules come first).',
    )
  if (wood !== null && isOilyWood(wood))
    cautions.push('An oily wood: its own moisture may differ from the curve for all woods.')
  const listing = wood === null ? undefined : protectedNote(wood)
  if (listing !== undefined) cautions.push(protectedWords(listing))
  return cautions
}
