import { readFile } from 'node:fs/promises'
import { z } from 'zod'

/** What a test of pages or API knows of the installation that it talks to. */
export const runningStackSchema = z.object({
  pid: z.int(),
  mode: z.string(),
  webUrl: z.url(),
  databaseUrl: z.string(),
  mqttUrl: z.string(),
  smtpUrl: z.string().optional(),
})

export type RunningStack = z.infer<typeof runningStackSchema>

export const readRunningStack = async (file: string): Promise<RunningStack> =>
  runningStackSchema.parse(JSON.parse(await readFile(file, 'utf8')))
