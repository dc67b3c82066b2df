import { readdir, readFile } from 'node:fs/promises'

/** The command lines of the processes of this machine that carry `mark` in their command or environment. */
export async function processesWith(mark: string): Promise<string[]> {
  const pids = (await readdir('/proc')).filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
  const found = await Promise.all(
    pids.map(async (pid) => {
      const command = await readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => '')
      const environment = await readFile(`/proc/${pid}/environ`, 'utf8').catch(() => '')
      const carries = command.includes(mark) || environment.includes(mark)
      return carries ? `${pid} ${command.replaceAll('\0', ' ').trim()}` : undefined
    }),
  )
  return found.filter((line) => line !== undefined)
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM'
  }
}
