import { parseArgs } from 'node:util'
import { scenarioNames, scenarioSchema, type ScenarioName } from '@/lib/sensors/scenarios'

export interface StartOptions {
  resetDemo: boolean
  scenario?: ScenarioName
}

/**
 * What stands behind `npm start --`.
 * @throws the sentence that says what is wrong with it
 */
export function startOptions(args: readonly string[]): StartOptions {
  const asked = parsed(args)
  const scenario = asked.scenario === undefined ? undefined : scenarioSchema.safeParse(asked.scenario)
  if (scenario?.success === false)
    throw new Error(
      `There is no scenario "${asked.scenario ?? ''}". There are:\n  ${scenarioNames.join('\n  ')}`,
    )
  return { resetDemo: asked['reset-demo'] ?? false, scenario: scenario?.data }
}

function parsed(args: readonly string[]) {
  try {
    return parseArgs({
      args: [...args],
      options: { 'reset-demo': { type: 'boolean' }, scenario: { type: 'string' } },
    }).values
  } catch (error) {
    const why = error instanceof Error ? error.message : ''
    const unknown = /^Unknown option '(.+?)'|^Unexpected argument '(.+?)'/.exec(why)
    const what =
      unknown === null
        ? '--scenario needs a name.'
        : `"${unknown[1] ?? unknown[2] ?? ''}" is not an option. There are two: --reset-demo and --scenario NAME.`
    throw new Error(what)
  }
}
