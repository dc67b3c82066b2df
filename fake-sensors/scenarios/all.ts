import { dampFront } from './damp-front'
import { dropOutCatchUp } from './drop-out-catch-up'
import { normalDay } from './normal-day'

/** Every scenario by the name that FAKE_SCENARIO takes. */
export const scenarios = {
  'normal-day': normalDay,
  'damp-front': dampFront,
  'drop-out-catch-up': dropOutCatchUp,
} as const

export type ScenarioName = keyof typeof scenarios
export const scenarioNames = Object.keys(scenarios) as [ScenarioName, ...ScenarioName[]]
