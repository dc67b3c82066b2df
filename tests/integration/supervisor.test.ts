import { mkdtemp, readFile, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { eventually } from '@/tests/support/eventually'
import { isAlive, processesWith } from '@/tests/support/processes'
import { createSupervisor, Stopped, type Service, type Supervisor } from '@/workers/supervisor/supervisor'

let folder: string
let said: string[]
let supervisor: Supervisor

beforeEach(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-supervisor-'))
  said = []
  supervisor = createSupervisor({
    logFolder: folder,
    say: (sentence) => said.push(sentence),
    firstDelayMs: 50,
    longestDelayMs: 200,
  })
})
afterEach(async () => {
  await supervisor.stop()
  await rm(folder, { recursive: true, force: true })
})

const script = (name: string, code: string): Service => ({
  name,
  command: process.execPath,
  args: ['-e', code],
  cwd: folder,
  env: { PATH: '/usr/bin:/bin', MARK: folder },
})

const stays = 'setInterval(() => undefined, 1000)'
/** Writes its name on the way out, so that the order of the ends can be read afterwards. */
const signsOff = (name: string) =>
  `process.on('SIGTERM', () => { require('fs').appendFileSync('ends', '${name} '); process.exit(0) });
   require('fs').writeFileSync('up-${name}', ''); ${stays}`
const isUp = (name: string) => () =>
  readFile(path.join(folder, `up-${name}`)).then(
    () => true,
    () => false,
  )

describe('the supervisor', () => {
  it('starts a service again that was killed, and says so', async () => {
    await supervisor.serve(script('broker', stays))
    const first = supervisor.pidOf('broker')
    expect(first).toBeDefined()
    process.kill(first ?? 0, 'SIGKILL')
    const second = await eventually('a new broker', () => {
      const pid = supervisor.pidOf('broker')
      return pid !== first && pid
    })
    expect(isAlive(second)).toBe(true)
    expect(said).toEqual(['broker ended by SIGKILL. Starting it again in 0.05 s.'])
  })

  it('waits longer from time to time for a service that ends again and again', async () => {
    await supervisor.serve(script('notices', 'process.exit(7)'))
    await eventually('four ends', () => said.length >= 4)
    expect(said.slice(0, 4)).toEqual([
      'notices ended with code 7. Starting it again in 0.05 s.',
      'notices ended with code 7. Starting it again in 0.1 s.',
      'notices ended with code 7. Starting it again in 0.2 s.',
      'notices ended with code 7. Starting it again in 0.2 s.',
    ])
  })

  it('ends the services in the reverse order of their start', async () => {
    for (const name of ['first', 'second', 'third']) {
      await supervisor.serve({ ...script(name, signsOff(name)), ready: isUp(name) })
    }
    await supervisor.stop()
    expect(await readFile(path.join(folder, 'ends'), 'utf8')).toBe('third second first ')
    expect(await processesWith(folder)).toEqual([])
  })

  it('ends what a service left behind in its group, and one that does not listen', async () => {
    const stubborn = `process.on('SIGTERM', () => undefined);
      require('child_process').spawn(process.execPath, ['-e', ${JSON.stringify(stays)}]);
      require('fs').writeFileSync('up-stubborn', ''); ${stays}`
    await supervisor.serve({ ...script('stubborn', stubborn), ready: isUp('stubborn'), graceMs: 200 })
    expect((await processesWith(folder)).length).toBeGreaterThanOrEqual(2)
    await supervisor.stop()
    await eventually('no process left', async () => (await processesWith(folder)).length === 0)
  })

  it('gives up on a service that never gets ready, and shows its last lines', async () => {
    const failing = { ...script('web', `console.error('no such page'); process.exit(3)`), ready: isUp('web') }
    await expect(supervisor.serve(failing)).rejects.toThrow(/web did not start[^]*no such page/)
  })

  it('shows the last lines of a task that failed', async () => {
    const task = {
      ...script('migrate', `console.log('column missing'); process.exit(2)`),
      words: 'Migrating',
    }
    await expect(supervisor.run(task)).rejects.toThrow(
      /Migrating failed \(it ended with code 2\)[^]*column missing/,
    )
  })

  it('ends a task that is under way when it is stopped, as no failure', async () => {
    const task = supervisor.run({ ...script('build', stays), words: 'Building' })
    const outcome = task.catch((error: unknown) => error)
    await eventually('the task', async () => (await processesWith(folder)).length > 0)
    await supervisor.stop()
    expect(await outcome).toBeInstanceOf(Stopped)
    expect(await processesWith(folder)).toEqual([])
  })

  it('shows a worker’s warning at the terminal and keeps the rest for the log', async () => {
    const lines = `console.log(JSON.stringify({ level: 'info', msg: 'ready' }));
      console.log(JSON.stringify({ level: 'warn', msg: 'database away', err: { message: 'refused' } })); ${stays}`
    await supervisor.serve(script('delivery', lines))
    await eventually('the warning', () => said.length > 0)
    expect(said).toEqual(['delivery: database away (refused)'])
    expect(await readFile(path.join(folder, 'delivery.log'), 'utf8')).toContain('"ready"')
  })
})
