import { chmod, mkdir, rename, rm, writeFile } from 'node:fs/promises'
import path from 'node:path'
import { DEMO_ROSTER_FILE, type DemoRoster } from '@/lib/sensors/demo-roster'

export const rosterFile = (dataDir: string): string => path.join(dataDir, DEMO_ROSTER_FILE)

/** Leaves the secrets where only this user can read them, and only as a whole file. */
export async function writeRoster(dataDir: string, roster: DemoRoster): Promise<void> {
  await mkdir(dataDir, { recursive: true })
  const file = rosterFile(dataDir)
  const beside = `${file}.new`
  await rm(beside, { force: true })
  await writeFile(beside, `${JSON.stringify(roster, null, 2)}\n`, { mode: 0o600 })
  // The mode above is narrowed by the umask, never widened; an odd one would leave a file that we can't read back.
  await chmod(beside, 0o600)
  await rename(beside, file)
}

export const removeRoster = (dataDir: string): Promise<void> => rm(rosterFile(dataDir), { force: true })
