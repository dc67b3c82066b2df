import type { PieceMaterial } from '@/lib/carry/material'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'

/** No piece of a site has this number inside. */
export const TYPICAL_BOX_ID = -1
export const TYPICAL_BOX_WORDS = 'a typical box (62 mm of ash, an easy fit)'

/** Stands in where no piece was chosen: an ash box of 62 mm with an easy lid, cut and kept in the house. Status: common practice, no source. */
export const typicalBox = (keepRoomId: number): PieceMaterial => ({
  code: '',
  facts: {
    number: '',
    stage: 'box',
    wood: 'fraxinus-excelsior',
    woodKind: 'plain',
    grain: 'end-grain',
    spigotOn: 'base',
    lidForm: 'plug',
    jointDiameterMm: 62,
    wallMm: 2.5,
    spigotMm: 6,
    lidMm: 8,
    lidWallMm: null,
    bodyWallMm: null,
    blankDiameterMm: null,
    endsSealed: false,
    finish: '',
    fitGrade: 'easy',
    clearanceMm: null,
    allowanceMm: null,
  },
  stays: [],
  followed: null,
  keepRoomId,
  isKeepRoomAssumed: true,
  cut: null,
  pace: UNLEARNED_PACE,
})
