import { Sheet } from '@/app/_components/ui/sheet'
import { titleOf } from './sections'

/** Each as what it is and what that means for a maker. */
const GAPS: readonly (readonly [string, string])[] = [
  [
    'Wild grain',
    'Burr, crotch, and blanks cut near the pith move their own way. No oval is drawn: fit it easy, test it.',
  ],
  [
    'Cracks and warp',
    'Wood that dries too fast cracks, and a wall that is held on one side bends. Neither is worked out.',
  ],
  [
    'Walls that hold each other back',
    'A thick bottom keeps the wall above it rounder than the sum says. The sum is an upper figure.',
  ],
  ['Threads', 'They are said to be threads, and no more.'],
  ['Green wood', 'Above fibre saturation water leaves by other ways. Only weighing tells.'],
  ['Stress', 'Roughed wood moves once more when stress lets go. The two rests stand for that; no sum does.'],
  [
    'Which way the wood came',
    'Wood drying and wood taking up water end up to 15 % of the figure apart. One curve stands for both.',
  ],
  [
    'Woods that are their own',
    'Oily dense woods take up less. They are marked, and reckoned with the common curve.',
  ],
  ['Heartwood and sapwood, early and late wood', 'One figure stands for all of a piece.'],
  ['Sun, draughts, a hand’s warmth', 'The air at the sensor counts as the air at the piece.'],
  ['Wet wood', 'Rain, wet sanding, glue and steam are no air.'],
  ['What the air will do', 'Without a forecast of the weather the last days are repeated, and that is said.'],
]

export function NotCovered() {
  return (
    <Sheet id="not-covered" title={titleOf('not-covered')} className="scroll-mt-6">
      <dl className="grid max-w-words gap-x-6 gap-y-2 sm:grid-cols-[14rem_1fr]">
        {GAPS.map(([what, words]) => (
          <div key={what} className="contents">
            <dt className="font-semibold max-sm:mt-2">{what}</dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
    </Sheet>
  )
}
