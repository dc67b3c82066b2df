import type { SteadyCarry } from '@/lib/carry/steady-carry'

/** What the landing page's figure is drawn from. */
export type LandingModel = {
  carry: SteadyCarry
  /** Where the box has been dragged to, % MC. */
  mcPct: number
  domain: readonly [number, number]
}

/** Whole % MC round everything, with room for the words at either end. */
export function landingDomain({ houseEmcPct, shopEmcPct }: SteadyCarry): readonly [number, number] {
  const low = Math.max(0, Math.floor(Math.min(houseEmcPct, shopEmcPct)) - 1)
  const high = Math.ceil(Math.max(houseEmcPct, shopEmcPct)) + 2
  return [low, Math.max(high, low + 10)]
}

/** The stretch that the box can be dragged along: from the house's air to the shop's. */
export function boxRange({ houseEmcPct, shopEmcPct }: SteadyCarry): readonly [number, number] {
  return [Math.min(houseEmcPct, shopEmcPct), Math.max(houseEmcPct, shopEmcPct)]
}

/** Which end of the bracket the shop's air pushes towards: where the lid may bind. */
export const bindingEnd = ({ houseEmcPct, shopEmcPct, lowMcPct, highMcPct }: SteadyCarry): number =>
  shopEmcPct >= houseEmcPct ? highMcPct : lowMcPct
