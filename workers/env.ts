import { parseConfig, parseRunningConfig, type Config, type RunningConfig } from '@/lib/config'

/** The configuration as the person gave it, for the supervisor. Throws the sentence that names a bad variable. */
export function readConfig(): Config {
  const parsed = parseConfig(process.env)
  if (!parsed.ok) throw new Error(parsed.error.sentence)
  return parsed.value
}

/** The configuration of a worker: with the database and the secret that the supervisor filled in. */
export function readRunningConfig(): RunningConfig {
  const parsed = parseRunningConfig(process.env)
  if (!parsed.ok) throw new Error(parsed.error.sentence)
  return parsed.value
}

/** The environment that children inherit, before the supervisor adds what it made. */
export const inheritedEnvironment = (): Record<string, string | undefined> => ({ ...process.env })
