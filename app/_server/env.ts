import 'server-only'
import { parseRunningConfig, type RunningConfig } from '@/lib/config'

let config: RunningConfig | undefined

/** The configuration of the web process. Read at the first request and not at import: a build has none. */
export function serverConfig(): RunningConfig {
  if (config === undefined) {
    const parsed = parseRunningConfig(process.env)
    if (!parsed.ok) throw new Error(parsed.error.sentence)
    config = parsed.value
  }
  return config
}

/** True in the built program, where nothing is reloaded. */
export const isProduction = process.env.NODE_ENV === 'production'
