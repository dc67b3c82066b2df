import { useId, type ReactNode } from 'react'
import { Hatch } from '@/app/_components/charts/hatch'
import type { RestView } from '@/lib/seasoning/rest-view'
import type { RestingFigure } from './resting-figure'

/** What stands for what, in the order of the figure; only what is drawn. */
export function CurveLegend({ figure, rest }: { figure: RestingFigure; rest: RestView }) {
  const hatch = useId()
  return (
    <ul className="mt-2 flex flex-col gap-x-6 gap-y-1 text-label sm:flex-row sm:flex-wrap">
      {figure.weighed.length > 0 ? (
        <Entry
          words={figure.isCorrected ? 'weighed, the room’s drift taken out' : 'weighed'}
          width={14}
          drawn={<circle cx="7" cy="6" r="4.5" fill="var(--board)" stroke="var(--ink)" strokeWidth="2" />}
        />
      ) : null}
      {figure.fit.length > 0 ? (
        <Entry
          words={
            figure.forecast.length > 0 ? 'fitted, dashed where forecast, grey the middle 8 in 10' : 'fitted'
          }
          drawn={<path d="M0 6H24" stroke="var(--ink)" strokeWidth="1.5" />}
        />
      ) : null}
      {figure.model.length > 0 ? (
        <Entry words="modelled from the rooms" drawn={<path d="M0 6H24" stroke="var(--edge)" />} />
      ) : null}
      {figure.ribbon === null || rest.target === null ? null : (
        <Entry
          words={`the middle of ${rest.target.room}’s year, ± 0.7 points`}
          drawn={
            <>
              <Hatch id={hatch} colour="var(--heart)" gap={6} width={1} />
              <rect x="0.5" y="0.5" width="23" height="11" fill={`url(#${hatch})`} stroke="var(--heart)" />
            </>
          }
        />
      )}
    </ul>
  )
}

function Entry({ words, drawn, width = 24 }: { words: string; drawn: ReactNode; width?: number }) {
  return (
    <li className="inline-flex items-center gap-2">
      <svg aria-hidden="true" width={width} height="12" className="shrink-0">
        {drawn}
      </svg>
      {words}
    </li>
  )
}
