'use client'

import { useState } from 'react'
import { useWidth } from '@/app/_components/charts/use-width'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { UNTOLD_JOINT } from '@/lib/carry/joint-defaults'
import { steadyCarry, type SteadyCarry } from '@/lib/carry/steady-carry'
import { formatEmc } from '@/lib/format/figures'
import { formatDuration } from '@/lib/format/times'
import type { FitGrade } from '@/lib/pieces/piece'
import { landingDomain } from './landing-model'
import { LandingRuleTall } from './landing-rule-tall'
import { LandingRuleWide } from './landing-rule-wide'
import { LandingStory } from './landing-story'

type Typed = {
  houseC: string
  houseRh: string
  shopC: string
  shopRh: string
  fit: Exclude<FitGrade, 'threaded'>
}

const start: Typed = { houseC: '20.6', houseRh: '45', shopC: '8', shopRh: '71', fit: 'easy' }
/** How long the box has been out when the page opens. */
const START_MINUTES = 90

const ranges = {
  houseC: [-10, 50],
  shopC: [-10, 50],
  houseRh: [0, 100],
  shopRh: [0, 100],
} as const

function figureOf(text: string, [min, max]: readonly [number, number]): number | undefined {
  const bare = text.trim().replace(',', '.').replace('−', '-')
  if (!/^-?\d{1,3}(\.\d{0,2})?$/.test(bare)) return undefined
  const value = Number(bare)
  return value >= min && value <= max ? value : undefined
}

function carryOf(typed: Typed): SteadyCarry | undefined {
  const houseC = figureOf(typed.houseC, ranges.houseC)
  const houseRh = figureOf(typed.houseRh, ranges.houseRh)
  const shopC = figureOf(typed.shopC, ranges.shopC)
  const shopRh = figureOf(typed.shopRh, ranges.shopRh)
  if (houseC === undefined || houseRh === undefined || shopC === undefined || shopRh === undefined)
    return undefined
  return steadyCarry(
    { temperatureC: houseC, humidityPct: houseRh },
    { temperatureC: shopC, humidityPct: shopRh },
    // A hollow lid of the same wall keeps step with the ring, so that one mark on the rule stands for both.
    {
      ...UNTOLD_JOINT,
      wood: 'fraxinus-excelsior',
      jointDiameterMm: 62,
      lidForm: 'hollow',
      fitGrade: typed.fit,
    },
  )
}

/** The product's question with four figures of one's own: where is the box, and how long may it stay? */
export function LandingFigure() {
  const [ref, width] = useWidth<HTMLDivElement>(1120)
  const [typed, setTyped] = useState(start)
  const [last, setLast] = useState(() => carryOf(start))
  const asTyped = carryOf(typed)
  const carry = asTyped ?? last
  // Undefined until it is dragged: it then stands where an hour and a half would bring it, whatever is typed.
  const [dragged, setDragged] = useState<number>()
  if (carry === undefined) return null

  const change = (part: Partial<Typed>) => {
    const next = { ...typed, ...part }
    setTyped(next)
    const made = carryOf(next)
    if (made !== undefined) setLast(made)
    setDragged(undefined)
  }
  const mcPct = dragged ?? carry.mcAfterPct(START_MINUTES)
  const model = { carry, mcPct, domain: landingDomain(carry) }
  const minutes = carry.minutesTo(mcPct)
  const valueText = `${formatEmc(mcPct)}, ${minutes === undefined ? 'after weeks in the shop' : `after ${formatDuration(minutes)} in the shop`}`
  const sentence = `Moisture rule: the house hangs at ${formatEmc(carry.houseEmcPct)}, the shop at ${formatEmc(carry.shopEmcPct)}, the box stands at ${formatEmc(mcPct)}.`
  const field = (key: keyof typeof ranges) => ({
    value: typed[key],
    inputMode: 'decimal' as const,
    'aria-invalid': figureOf(typed[key], ranges[key]) === undefined ? true : undefined,
    onChange: (event: { target: { value: string } }) => {
      change({ [key]: event.target.value })
    },
  })

  return (
    <div className="flex flex-col gap-6">
      <div className="[--figure-ground:var(--chalk)] max-sm:px-4">
        <div ref={ref} className="max-sm:hidden">
          <LandingRuleWide
            model={model}
            width={Math.max(width, 600)}
            sentence={sentence}
            valueText={valueText}
            onMove={setDragged}
          />
        </div>
        <div className="sm:hidden">
          <LandingRuleTall model={model} sentence={sentence} valueText={valueText} onMove={setDragged} />
        </div>
      </div>
      <div className="flex flex-col gap-3 px-4 sm:px-0">
        <LandingStory carry={carry} minutes={minutes} />
        <FlowingSentence>
          The house is at <SentenceInput label="Temperature in the house" unit="°C" {...field('houseC')} />{' '}
          and <SentenceInput label="Humidity in the house" unit="% RH" {...field('houseRh')} />, the shop at{' '}
          <SentenceInput label="Temperature in the shop" unit="°C" {...field('shopC')} /> and{' '}
          <SentenceInput label="Humidity in the shop" unit="% RH" {...field('shopRh')} />, and the lid fits{' '}
          <SentenceSelect
            label="How the lid fits"
            value={typed.fit}
            onChange={(event) => {
              const fit = fits.find((grade) => grade === event.target.value)
              if (fit) change({ fit })
            }}
          >
            {fits.map((grade) => (
              <option key={grade} value={grade}>
                {grade}
              </option>
            ))}
          </SentenceSelect>
          .
        </FlowingSentence>
        <p role="status" className="text-label text-warn empty:hidden">
          {asTyped === undefined
            ? 'Temperatures go from −10 to 50 °C and humidity from 0 to 100 % RH; the figure still shows what was typed before.'
            : ''}
        </p>
      </div>
    </div>
  )
}

const fits = ['suction', 'snap', 'snug', 'easy', 'loose'] as const
