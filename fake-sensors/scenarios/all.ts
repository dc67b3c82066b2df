import { type ScenarioName, scenarioNames } from '@/lib/sensors/scenarios'
import { dampFront } from './damp-front'
import { dropOutCatchUp } from './drop-out-catch-up'
import { normalDay } from './normal-day'
import { ruleScenario } from './rules'
import type { Scenario } from './scenario'

const own: Partial<Record<ScenarioName, Scenario>> = {
  'normal-day': normalDay,
  'damp-front': dampFront,
  'drop-out-catch-up': dropOutCatchUp,
}

/** The scenario of a name that FAKE_SCENARIO takes. */
export const scenarioOf = (name: ScenarioName): Scenario => own[name] ?? ruleScenario(name)

export const scenarios = scenarioNames.map(scenarioOf)
