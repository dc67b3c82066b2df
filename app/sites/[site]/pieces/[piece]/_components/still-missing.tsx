import type { ReactNode } from 'react'
import { Mark } from '@/app/_components/ui/mark'
import { formatEmc, formatMass, formatPoints } from '@/lib/format/figures'
import type { RestView } from '@/lib/seasoning/rest-view'
import type { UnitSystem } from '@/lib/sites/site'

/** What time brings has the hourglass, what a scale tells the balance; the rest has to be found out. */
const marks: Readonly<Record<string, 'keep-short' | 'weigh'>> = {
  'rest-after-roughing': 'keep-short',
  'rest-after-near-final': 'keep-short',
  'mc-off': 'keep-short',
  'weights-differ': 'keep-short',
  'too-few-weights': 'weigh',
}

/** What the ready rule still asks for, then what it has; and what the moisture is known from. */
export function StillMissing({ rest, units }: { rest: RestView; units: UnitSystem }) {
  const noForecast = noForecastWords(rest)
  return (
    <div className="flex flex-col gap-3">
      <ul className="flex flex-col gap-3">
        {rest.missing.map(({ code, words }) => (
          <Line key={code} mark={marks[code] ?? 'unknown'}>
            {words}
          </Line>
        ))}
        {rest.met.map((words) => (
          <Line key={words} mark="fine">
            {words}
          </Line>
        ))}
      </ul>
      {noForecast === null ? null : <p className="max-w-words text-ink-soft">{noForecast}</p>}
      <p className="max-w-words text-label text-ink-soft">{moistureWords(rest, units)}</p>
      {rest.target !== null && rest.target.days < 350 ? (
        <p className="max-w-words text-label text-ink-soft">
          The year of {rest.target.room} is known over {rest.target.days} days so far.
        </p>
      ) : null}
    </div>
  )
}

/** Why no curve leads on, where that is news: not of weights that hold, nor of too few, which is said already. */
function noForecastWords({ state, missing, noForecast }: RestView): string | null {
  if (noForecast === null || state !== 'not-ready' || noForecast.code === 'too-few-weights') return null
  const isLevel = noForecast.code === 'no-change' || noForecast.code === 'not-one-way'
  return isLevel && !missing.some(({ code }) => code === 'weights-differ') ? null : noForecast.words
}

function Line({
  mark,
  children,
}: {
  mark: 'keep-short' | 'weigh' | 'unknown' | 'fine'
  children: ReactNode
}) {
  return (
    <li className="flex gap-3">
      <Mark kind={mark} size={20} className="mt-0.5" />
      <span className="max-w-words">{children}</span>
    </li>
  )
}

const fromWords = {
  'oven-dry': 'by its weight over the oven-dry mass',
  meter: 'by its weight and a meter reading',
  model: 'as modelled from its rooms',
} as const

function moistureWords({ mc, dryMass }: RestView, units: UnitSystem): string {
  if (mc === null) return 'Nothing tells its moisture yet.'
  const dry =
    dryMass === null || dryMass.from === 'model'
      ? ' An oven-dry mass or a meter reading would tell it by weight.'
      : ` Its oven-dry mass is taken as ${formatMass(dryMass.grams, units)}, give or take ${formatMass(dryMass.doubtG, units)}.`
  return `At about ${formatEmc(mc.pct)}, give or take ${formatPoints(mc.doubtPct)} of % MC, ${fromWords[mc.from]}.${dry}`
}
