import { FIBRE_SATURATION_PCT, LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { exactly, figure, percent } from '@/lib/method/figure'
import { CLASS_MOVEMENT_DOUBT, SPECIES_MOVEMENT_DOUBT } from '@/lib/wood/movement-class'
import type { FormulaFacts } from '../formula-facts'

const HANDBOOK = 'Wood Handbook (FPL-GTR-190, 2010)'
const SPECIES_DOUBT = `± ${percent(SPECIES_MOVEMENT_DOUBT)} within a species (from memory), ± ${percent(CLASS_MOVEMENT_DOUBT)} where only its class is known (derived)`

export const movementFormulas: readonly FormulaFacts[] = [
  {
    id: 'size-change',
    title: 'How much a size grows',
    plain:
      'Wood grows across the grain as it takes up water, in proportion: more along the rings than across them.',
    lines: ['Δ D = D C (M_2 − M_1)'],
    letters:
      'D a size, C its change for each % MC (C_T along the rings, C_R across them), M moisture content before and after.',
    source: `${HANDBOOK}, Eq. 13-2 and Table 13-5`,
    status: 'read',
    range: '6 to 14 % MC by the print; used from 0 to 30 % MC',
    limits:
      'Straight grain, wood free to move. Wild grain (burr, crotch, near the pith) gets no figures at all',
    doubt: SPECIES_DOUBT,
  },
  {
    id: 'size-change-shrinkage',
    title: 'The same from the whole shrinkage',
    plain: 'Between any two moisture contents, from how much the wood shrinks between green and oven-dry.',
    lines: [`Δ D = {D (M_2 − M_1)}/{{100 F}/{S} − F + M_1}`],
    letters: `S the shrinkage in %, F fibre saturation, ${exactly(FIBRE_SATURATION_PCT)} % MC unless known. M is taken as 0 to F: above it nothing moves.`,
    source: `${HANDBOOK}, Eq. 13-3, with F left open`,
    status: 'from memory',
    range: '0 to 300 % MC; S up to 30 %',
    limits: 'A straight line from saturation to oven-dry',
    doubt: SPECIES_DOUBT,
  },
  {
    id: 'shrinkage-to',
    title: 'How far wood has shrunk',
    plain: 'The share of its whole shrinkage that wood has behind it at a moisture content.',
    lines: ['S_M = S {F − M}/{F}'],
    letters: 'S_M in % of the green size; nothing above F.',
    source: `${HANDBOOK}, ch. 4`,
    status: 'from memory',
    range: '0 to 300 % MC',
    limits: 'A straight line',
    doubt: SPECIES_DOUBT,
  },
  {
    id: 'coefficient',
    title: 'A coefficient from a printed shrinkage',
    plain: 'Where only the whole shrinkage of a wood is printed, this gives its movement for each % MC.',
    lines: ['C = {1}/{{100 F}/{S} − F + 10}'],
    letters: 'Letters as above; 10 is the % MC about which the printed coefficients stand.',
    source: `Eq. 13-3 at 10 % MC; gives back ${HANDBOOK}, Table 13-5 from Table 4-3`,
    status: 'confirmed',
    range: 'S up to 30 %',
    limits: `Along the grain no shrinkage is used but ${figure(LONGITUDINAL_PER_PCT, 5)} for each % MC`,
    doubt: SPECIES_DOUBT,
  },
]
