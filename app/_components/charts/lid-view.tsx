'use client'

import { ChevronDown } from 'lucide-react'
import { type ReactNode, useId, useMemo } from 'react'
import type { DoubtfulJoint } from '@/lib/fit/clearance-curve'
import { feelOfCut, feelWords, spareWords } from '@/lib/fit/feel'
import { lidShape, lidTurned, type LidShape, type LidTurned } from '@/lib/fit/lid-view'
import { workedFigures, type WorkedFigure } from '@/lib/fit/worked-figures'
import { formatFineLength } from '@/lib/format/figures'
import { plainText } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import { FigureFrame, FigureTable } from './figure-frame'
import { LidCurve, type OtherCurve } from './lid-curve'
import { LidDrawing } from './lid-drawing'

type LidViewProps = {
  /** The joint as it is to be seen; null while its size isn't known: then nothing is drawn. */
  joint: DoubtfulJoint | null
  /** Stands in place of the drawing where there is no joint: what to tell, or a field to tell it in. */
  ask?: ReactNode
  units: UnitSystem
  /** How far the lid is turned, whole degrees, 0 to 90; and what to do when it is turned. */
  angleDeg: number
  onTurn: (angleDeg: number) => void
  /** Which part carries the spigot: the base (the lid goes over) or the lid (it drops in). */
  spigotOn?: 'base' | 'lid'
  /** Choices of room, stay and home, above the drawing. */
  choices?: ReactNode
  /** The same lid in another state, dashed beside the curve. */
  other?: OtherCurve
  title?: ReactNode
  headingLevel?: 2 | 3
}

/** The lid, end on: two ovals, a handle to turn one of them, and the clearance at each angle beside it. */
export function LidView({ joint, ask, ...rest }: LidViewProps) {
  if (joint === null) {
    return ask ?? <p className="text-ink-soft">Tell how wide the joint is, and the lid is drawn here.</p>
  }
  return <LidFigure {...rest} joint={joint} />
}

function LidFigure({
  joint,
  units,
  angleDeg,
  onTurn,
  spigotOn = 'base',
  choices,
  other,
  title = 'The lid, end on',
  headingLevel,
}: Omit<LidViewProps, 'joint' | 'ask'> & { joint: DoubtfulJoint }) {
  const shape = useMemo(() => lidShape(joint, units), [joint, units])
  const turned = useMemo(() => lidTurned(shape, angleDeg), [shape, angleDeg])
  const name = figureName(shape, turned, units)
  return (
    <FigureFrame
      title={title}
      aside={`Drag the handle to turn it. Ovals drawn ${timesTooLarge(shape)}.`}
      tableName="Clearance as a table"
      headingLevel={headingLevel ?? 2}
      table={<CurveTable shape={shape} units={units} />}
    >
      {choices ? <div className="mt-3">{choices}</div> : null}
      <div className="mt-4 grid gap-x-10 gap-y-6 [--figure-ground:var(--board)] lg:grid-cols-2 print:mt-0 print:grid-cols-2">
        <div className="min-w-0">
          <LidDrawing shape={shape} turned={turned} name={name} onTurn={onTurn} />
          <TurnSlider turned={turned} onTurn={onTurn} />
        </div>
        <div className="min-w-0">
          <p className="mb-3 text-title font-semibold">
            {shape.headline.map((part, index) => (
              <span key={index} className={part.strong ? 'text-warn' : undefined}>
                {part.text}
              </span>
            ))}
          </p>
          <LidCurve
            curve={shape.curve}
            turned={turned}
            other={other}
            units={units}
            name={name}
            onTurn={onTurn}
          />
          <p className="mt-1 text-label text-ink-soft">
            Least clearance, {units === 'metric' ? 'mm' : 'in'}, by how far the lid is turned. Grey: the
            middle 8 in 10.
          </p>
          <p className="mt-3 print:mt-1">By the quarter turn: {shape.quarterTurnWords}.</p>
          <Worked shape={shape} turned={turned} units={units} spigotOn={spigotOn} />
        </div>
      </div>
    </FigureFrame>
  )
}

function TurnSlider({ turned, onTurn }: { turned: LidTurned; onTurn: (angleDeg: number) => void }) {
  const id = useId()
  return (
    <div className="no-print mx-auto flex max-w-[27rem] items-center gap-4">
      <label htmlFor={id} className="text-label font-semibold whitespace-nowrap">
        Turn the lid
      </label>
      <input
        id={id}
        type="range"
        min={0}
        max={90}
        step={1}
        value={turned.angleDeg}
        aria-valuetext={turned.words.spoken}
        onChange={(event) => {
          onTurn(Number(event.target.value))
        }}
        className="h-11 min-w-0 grow accent-heart"
      />
      <span aria-hidden="true" className="w-10 text-right font-semibold">
        {`${String(Math.round(turned.angleDeg))}°`}
      </span>
    </div>
  )
}

const TABLE_STEP_DEG = 5

function CurveTable({ shape, units }: { shape: LidShape; units: UnitSystem }) {
  return (
    <FigureTable
      caption="Least clearance of the lid by how far it is turned"
      heads={['Turned', 'Least clearance, about', '8 in 10 between', 'By hand']}
      rows={shape.curve
        .filter((point) => point.angleDeg % TABLE_STEP_DEG === 0)
        .map((point) => [
          `${String(point.angleDeg)}°`,
          formatFineLength(point.middleMm, units),
          `${formatFineLength(point.lowMm, units)} and ${formatFineLength(point.highMm, units)}`,
          feelWords[feelOfCut(point.middleMm, shape.joint.clearanceMm)],
        ])}
    />
  )
}

type WorkedProps = { shape: LidShape; turned: LidTurned; units: UnitSystem; spigotOn: 'base' | 'lid' }

/** Sizes to 0.01 mm: for those who check the reckoning, not for those who cut. */
function Worked({ shape, turned, units, spigotOn }: WorkedProps) {
  const [recess, spigot] = spigotOn === 'base' ? ['the lid', 'the base'] : ['the base', 'the lid']
  const names: Record<WorkedFigure['of'], string> = {
    socket: `Recess in ${recess}`,
    spigot: `Spigot on ${spigot}`,
    'socket-oval': 'Recess out of round by',
    'spigot-oval': 'Spigot out of round by',
    clearance: `Clearance, ${turned.words.turned}`,
    'lined-up': 'Clearance, grain lined up',
    quarter: 'Clearance, a quarter turn on',
  }
  return (
    <details className="group mt-4 border-t border-line print:hidden print:open:block">
      <summary className="flex min-h-11 items-center justify-between font-semibold text-heart">
        Worked figures
        <ChevronDown
          aria-hidden="true"
          size={20}
          strokeWidth={1.5}
          className="transition-transform group-open:rotate-180"
        />
      </summary>
      <dl>
        {workedFigures(shape, turned, units).map(({ of, value }) => (
          <div
            key={of}
            className="flex flex-wrap justify-between gap-x-4 border-b border-line py-2 last:border-b-0"
          >
            <dt>{names[of]}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
      <p className="text-label text-ink-soft">
        Along the rings × across them. Worked finer than wood is known: count on 0.05 mm at best.
      </p>
    </details>
  )
}

const timesTooLarge = ({ exaggeration }: LidShape): string =>
  exaggeration === 1 ? 'in their true proportion' : `about ${String(exaggeration)} times too large`

function figureName(shape: LidShape, turned: LidTurned, units: UnitSystem): string {
  const spare = spareWords(turned.clearance.middleMm, units)
  return `${plainText(shape.headline)}. Now ${turned.words.spoken}: ${spare}.`
}
