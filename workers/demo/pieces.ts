import type { FitGrade, Grain, Stage, WoodKind } from '@/lib/pieces/piece'
import type { Role } from '@/lib/sites/permissions'
import type { RoomKey } from './place'

/** A piece of the invented place. What is left out was never told to the product, and is shown as assumed. */
export interface PlacePiece {
  number: string
  stage: Stage
  wood: string | null
  /** Where it rests when it is not out. */
  room: RoomKey
  keep?: RoomKey
  bornDaysAgo: number
  /** Where it was before it came to its room, and until when. */
  before?: { room: RoomKey; untilDaysAgo: number }
  /** Cut in the air of a room; without a day only the month before its birth is known, as for an imported box. */
  fit?: { room: RoomKey; daysAgo: number; isImported?: boolean }
  jointDiameterMm?: number
  wallMm?: number
  spigotMm?: number
  lidMm?: number
  bodyWallMm?: number
  /** Of a blank: how thick it is, whether its ends are sealed, and when it was turned round, if it was. */
  blankDiameterMm?: number
  endsSealed?: boolean
  roughedDaysAgo?: number
  fitGrade?: FitGrade
  allowanceMm?: number
  clearanceMm?: number
  woodKind?: WoodKind
  grain?: Grain
  spigotOn?: 'base' | 'lid'
  lidForm?: 'plug' | 'hollow'
  finish?: string
  note?: string
  owner?: Role
  isPrivate?: boolean
  isShared?: boolean
}

const box = (number: string, wood: string | null, rest: Partial<PlacePiece>): PlacePiece => ({
  number,
  wood,
  stage: 'box',
  room: 'cupboard',
  keep: 'cupboard',
  bornDaysAgo: 60,
  ...rest,
})

const roughed = (number: string, wood: string, rest: Partial<PlacePiece>): PlacePiece => ({
  number,
  wood,
  stage: 'roughed',
  room: 'cupboard',
  keep: 'cupboard',
  bornDaysAgo: 200,
  ...rest,
})

const blank = (number: string, wood: string, rest: Partial<PlacePiece> = {}): PlacePiece => ({
  number,
  wood,
  stage: 'blank',
  room: 'store',
  keep: 'cupboard',
  bornDaysAgo: 240,
  ...rest,
})

/**
 * Boxes with a part in today's story come first; `choose-joints.ts` settles how fine their fit is, so that the story
 * holds in June as in December.
 */
export const placePieces: readonly PlacePiece[] = [
  box('207', 'fraxinus-excelsior', {
    jointDiameterMm: 70,
    wallMm: 4,
    bodyWallMm: 6,
    fitGrade: 'snug',
    bornDaysAgo: 30,
    fit: { room: 'cupboard', daysAgo: 6 },
    finish: 'oil',
    note: 'Finial still to be turned.',
  }),
  box('221', 'buxus-sempervirens', {
    jointDiameterMm: 46,
    wallMm: 4,
    fitGrade: 'easy',
    bornDaysAgo: 24,
    fit: { room: 'cupboard', daysAgo: 5 },
  }),
  box('203', 'acer-pseudoplatanus', {
    jointDiameterMm: 58,
    wallMm: 3.5,
    fitGrade: 'snug',
    bornDaysAgo: 40,
    fit: { room: 'cupboard', daysAgo: 7 },
    finish: 'lacquer, outside only',
  }),
  box('219', 'fraxinus-excelsior', {
    jointDiameterMm: 88,
    wallMm: 3,
    fitGrade: 'snug',
    bornDaysAgo: 21,
    fit: { room: 'cupboard', daysAgo: 4 },
    note: 'Foot to be finished off.',
    isShared: true,
  }),
  box('214', 'fraxinus-excelsior', {
    jointDiameterMm: 62,
    wallMm: 4,
    fitGrade: 'easy',
    bornDaysAgo: 28,
    fit: { room: 'cupboard', daysAgo: 5 },
  }),
  box('205', 'carpinus-betulus', {
    jointDiameterMm: 60,
    wallMm: 4,
    fitGrade: 'easy',
    bornDaysAgo: 50,
    fit: { room: 'cupboard', daysAgo: 6 },
  }),
  box('198', 'fagus-sylvatica', {
    jointDiameterMm: 64,
    wallMm: 3.5,
    fitGrade: 'snug',
    bornDaysAgo: 75,
    before: { room: 'shop', untilDaysAgo: 38 },
    fit: { room: 'shop', daysAgo: 40 },
    note: 'Fitted in the shop in one go, and loose since it came in. Re-true it in the house.',
  }),
  box('224', 'juglans-regia', {
    jointDiameterMm: 55,
    wallMm: 3.5,
    fitGrade: 'easy',
    bornDaysAgo: 18,
    fit: { room: 'cupboard', daysAgo: 6 },
    isShared: true,
  }),
  box('191', 'prunus-avium', {
    jointDiameterMm: 48,
    wallMm: 3,
    fitGrade: 'easy',
    bornDaysAgo: 130,
    fit: { room: 'cupboard', daysAgo: 96 },
    finish: 'oil and wax',
    isShared: true,
  }),
  box('193', 'ilex-aquifolium', {
    jointDiameterMm: 40,
    wallMm: 2.5,
    fitGrade: 'suction',
    room: 'study',
    bornDaysAgo: 120,
    fit: { room: 'cupboard', daysAgo: 20 },
    note: 'On the desk, for showing.',
    isShared: true,
  }),
  box('195', 'taxus-baccata', {
    jointDiameterMm: 52,
    wallMm: 3.5,
    fitGrade: 'snug',
    bornDaysAgo: 110,
    fit: { room: 'cupboard', daysAgo: 12 },
    isShared: true,
  }),
  box('200', 'dalbergia-melanoxylon', {
    jointDiameterMm: 38,
    wallMm: 3,
    fitGrade: 'snap',
    room: 'study',
    bornDaysAgo: 160,
    fit: { room: 'study', daysAgo: 30 },
  }),
  box('204', 'laburnum-anagyroides', {
    jointDiameterMm: 50,
    wallMm: 3,
    fitGrade: 'snug',
    bornDaysAgo: 66,
    fit: { room: 'cupboard', daysAgo: 15 },
  }),
  box('209', 'platanus-x-hispanica', {
    jointDiameterMm: 66,
    wallMm: 3.5,
    fitGrade: 'easy',
    bornDaysAgo: 45,
    fit: { room: 'cupboard', daysAgo: 18 },
    owner: 'owner',
  }),
  box('210', 'olea-europaea', {
    jointDiameterMm: 44,
    woodKind: 'wild',
    fitGrade: 'easy',
    bornDaysAgo: 80,
    fit: { room: 'cupboard', daysAgo: 33 },
    note: 'Burr, no two rings alike.',
  }),
  box('211', 'acer-spp', {
    jointDiameterMm: 54,
    woodKind: 'stabilised',
    fitGrade: 'snug',
    bornDaysAgo: 70,
    fit: { room: 'cupboard', daysAgo: 29 },
  }),
  box('212', 'buxus-sempervirens', {
    jointDiameterMm: 36,
    fitGrade: 'threaded',
    bornDaysAgo: 90,
    fit: { room: 'cupboard', daysAgo: 41 },
    spigotOn: 'lid',
  }),
  // An old box of which nobody remembers much.
  box('216', null, { jointDiameterMm: 57, bornDaysAgo: 12, note: 'Came back for a repair.' }),
  box('217', 'quercus-robur-petraea', {
    jointDiameterMm: 72,
    fitGrade: 'loose',
    grain: 'side-grain',
    room: 'study',
    bornDaysAgo: 35,
    fit: { room: 'study', daysAgo: 200, isImported: true },
    owner: 'owner',
    isPrivate: true,
  }),
  roughed('88', 'prunus-avium', {
    bodyWallMm: 12,
    bornDaysAgo: 390,
    before: { room: 'store', untilDaysAgo: 352 },
  }),
  roughed('91', 'fraxinus-excelsior', {
    bodyWallMm: 12,
    bornDaysAgo: 380,
    before: { room: 'store', untilDaysAgo: 340 },
  }),
  // Has kept its weight for months, and is still on its way: so dense a wood loses less than a scale can show.
  roughed('94', 'dalbergia-melanoxylon', {
    bodyWallMm: 44,
    bornDaysAgo: 300,
    before: { room: 'store', untilDaysAgo: 232 },
    note: 'Same weight three times running.',
  }),
  roughed('102', 'fagus-sylvatica', {
    bodyWallMm: 24,
    bornDaysAgo: 210,
    before: { room: 'store', untilDaysAgo: 96 },
  }),
  roughed('103', 'fraxinus-excelsior', {
    bodyWallMm: 26,
    bornDaysAgo: 190,
    before: { room: 'store', untilDaysAgo: 84 },
  }),
  roughed('107', 'juglans-regia', {
    bodyWallMm: 13,
    bornDaysAgo: 150,
    before: { room: 'shop', untilDaysAgo: 61 },
  }),
  roughed('110', 'acer-pseudoplatanus', {
    bodyWallMm: 22,
    bornDaysAgo: 90,
    before: { room: 'shop', untilDaysAgo: 20 },
  }),
  blank('121', 'fraxinus-excelsior'),
  blank('122', 'fraxinus-excelsior'),
  blank('125', 'taxus-baccata', { bornDaysAgo: 310, note: 'Split from one log, pith cut away.' }),
  // A plank's end that lay in the house for years before it was turned round.
  blank('127', 'quercus-robur-petraea', {
    room: 'cupboard',
    bornDaysAgo: 395,
    blankDiameterMm: 96,
    endsSealed: true,
    roughedDaysAgo: 118,
    note: 'Turned round and left in the cupboard.',
  }),
  blank('130', 'laburnum-anagyroides', { bornDaysAgo: 140, isPrivate: true, owner: 'owner' }),
]
