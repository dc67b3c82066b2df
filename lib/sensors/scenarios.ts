import { z } from 'zod'
import { type Rule, ruleSchema } from '@/lib/notices/notice'

/** Courses of events for the simulated place that are about the weather or the sensors, not about one rule. */
const courses = ['normal-day', 'damp-front', 'drop-out-catch-up'] as const

/** Every rule but the test, which is sent by a press. */
export const scenarioRules = ruleSchema.options.filter(
  (rule): rule is Exclude<Rule, 'test'> => rule !== 'test',
)

/** What `npm start -- --scenario` takes: a course of events, or a rule that is to be told. */
export const scenarioSchema = z.enum([...courses, ...scenarioRules])
export type ScenarioName = z.infer<typeof scenarioSchema>
export const scenarioNames = scenarioSchema.options

/** The rule that a scenario makes happen; undefined for the others. */
export const ruleOfScenario = (name: ScenarioName): Rule | undefined =>
  scenarioRules.find((rule) => rule === name)
