import { DOUBT_SEED, DRAWS } from '@/lib/doubt/draws'
import { EDGE_OF_EIGHT_IN_TEN, EDGE_OF_NINE_IN_TEN } from '@/lib/doubt/spread'
import { exactly } from '@/lib/method/figure'
import type { FormulaFacts } from '../formula-facts'

export const doubtFormulas: readonly FormulaFacts[] = [
  {
    id: 'spread',
    title: 'How a doubt is put into figures',
    plain:
      'What is only known within a factor is known as well upward as downward; doubts that have nothing to do with each other partly cancel.',
    lines: [
      `σ = {ln f}/{${exactly(EDGE_OF_NINE_IN_TEN)}}`,
      `σ = {ln (b / a)}/{2 × ${exactly(EDGE_OF_EIGHT_IN_TEN)}}`,
      'σ = √{σ_1^2 + σ_2^2 + …}',
    ],
    letters:
      'σ the standard deviation of a logarithm; f the factor that holds nine times in ten; a and b the bounds that hold eight times in ten.',
    source: 'The normal distribution; JCGM 100:2008, 5.1.2',
    status: 'derived',
    range: 'Every doubt of the program',
    limits: 'Causes taken as independent',
    doubt: 'The figures that go in are themselves derived or guessed: see the table',
  },
  {
    id: 'draws',
    title: 'How doubts are drawn together',
    plain:
      'Everything that is not known is drawn at once, many times, none of it as its worst case. Where 1 in 10 of these ways has used up the allowance, the early edge lies: that is the time to keep.',
    lines: ['U = U (D f, C g, A k, u + ε_u, M_0 + ε_0)', 'ln f , ln g , ln k "normal"'],
    letters: `f, g, k on diffusion, movement and allowance; ε on the air there and on the wood at the start. ${exactly(DRAWS)} draws, seed ${exactly(DOUBT_SEED)}, the same everywhere and each time, so that a figure never jumps between two looks.`,
    source:
      'Latin hypercube: McKay, Beckman and Conover, Technometrics (1979); generator: Marsaglia, Journal of Statistical Software (2003)',
    status: 'derived',
    range: 'Time out, carry check, allowance used, weighing',
    limits:
      'Ways in which the fit would be gone before the start are left out unless somebody has said so: that the lid still turns is known',
    doubt: 'The early edge is steady to a few percent from seed to seed',
  },
]
