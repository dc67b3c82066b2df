'use client'

import { ChevronDown } from 'lucide-react'
import type { ReactNode } from 'react'
import { formatEmc, formatPoints } from '@/lib/format/figures'
import { Button } from '../ui/button'
import { FigureFrame, FigureTable } from './figure-frame'
import { MoistureRuleTall } from './moisture-rule-tall'
import { MoistureRuleWide } from './moisture-rule-wide'
import { RuleStrip } from './rule-strip'
import type { RuleModel } from './rule-model'
import { useWidth } from './use-width'

type MoistureRuleProps = {
  model: RuleModel
  title: string
  aside?: ReactNode
  /** Loading: no colour and nothing on it. Error: what is shown was fetched before, and says so below. */
  state?: 'ready' | 'loading' | 'error'
  /** What is said below when it is empty or could not be fetched. */
  note?: ReactNode
  onRetry?: () => void
  /** On a phone, while something is out, the rule folds to one line. */
  folded?: { words: ReactNode }
}

/** The product's first figure: what the air would do to the wood, given time. Hangs on the wall with no sheet round it. */
export function MoistureRule({
  model,
  title,
  aside,
  state = 'ready',
  note,
  onRetry,
  folded,
}: MoistureRuleProps) {
  const [ref, width] = useWidth<HTMLDivElement>(960)
  const isPlain = state === 'loading'
  const isBare = model.flags.length === 0 && model.shelf.length === 0
  return (
    <FigureFrame
      title={title}
      aside={aside}
      tableName="Rule as a table"
      table={<RuleTable model={model} />}
      className="[--figure-ground:var(--chalk)] max-sm:px-4"
    >
      <div ref={ref} className="max-sm:hidden">
        <MoistureRuleWide model={model} width={Math.max(width, 560)} isPlain={isPlain} />
      </div>
      <div className="sm:hidden">
        {folded ? (
          <details className="group border-y border-edge py-2">
            <summary className="flex min-h-11 flex-col justify-center gap-2">
              <span className="flex items-center justify-between gap-2">
                <span>{folded.words}</span>
                <ChevronDown
                  aria-hidden="true"
                  size={20}
                  strokeWidth={1.5}
                  className="shrink-0 transition-transform group-open:rotate-180"
                />
              </span>
              <RuleStrip model={model} />
            </summary>
            <MoistureRuleTall model={model} isPlain={isPlain} />
          </details>
        ) : isBare ? (
          <MoistureRuleWide model={model} width={358} isPlain={isPlain} />
        ) : (
          <MoistureRuleTall model={model} isPlain={isPlain} />
        )}
      </div>
      {note ? <div className="mt-3">{note}</div> : null}
      {state === 'error' && onRetry ? (
        <Button className="mt-3" onClick={onRetry}>
          Try again
        </Button>
      ) : null}
    </FigureFrame>
  )
}

function RuleTable({ model }: { model: RuleModel }) {
  const rows = [
    ...model.flags.map((flag) => [flag.name, flag.value, '']),
    ...model.bands.map((band) => [
      band.label,
      `${formatEmc(band.lowPct)} to ${formatEmc(band.highPct)}`,
      'nine days in ten',
    ]),
    ...model.brackets.map((bracket) => [
      bracket.label,
      formatEmc(bracket.atPct),
      `keeps its fit from ${formatEmc(bracket.lowPct)} to ${formatEmc(bracket.highPct)}`,
    ]),
    ...model.shelf.map((item) => [item.label, `about ${formatEmc(item.mcPct)}`, item.sub]),
  ]
  return <FigureTable caption={model.sentence} heads={['What', 'Moisture content', 'More']} rows={rows} />
}

/** "House 8.5, shop 13.6 % MC: 5.1 points apart", for the folded rule. */
export function apartWords(
  a: { name: string; emcPct: number },
  b: { name: string; emcPct: number },
): ReactNode {
  const apart = Math.abs(a.emcPct - b.emcPct)
  return (
    <>
      {a.name} {formatEmc(a.emcPct)}, {b.name} {formatEmc(b.emcPct)}:{' '}
      <strong>{apart < 0.7 ? 'no telling difference' : `${formatPoints(apart)} apart`}</strong>
    </>
  )
}
