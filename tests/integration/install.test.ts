import { spawn } from 'node:child_process'
import { chmod, copyFile, mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { eventually } from '@/tests/support/eventually'
import { cleanEnvironment } from '@/tests/support/env'
import { processesWith } from '@/tests/support/processes'
import { root } from '@/tests/support/stack'

/** A checkout with nothing installed in it, and an npm of the test's own making. */
let checkout: string

beforeEach(async () => {
  checkout = await mkdtemp(path.join(os.tmpdir(), 'lidfast-checkout-'))
  await mkdir(path.join(checkout, 'workers/supervisor'), { recursive: true })
  await mkdir(path.join(checkout, 'bin'))
  await copyFile(
    path.join(root, 'workers/supervisor/start.sh'),
    path.join(checkout, 'workers/supervisor/start.sh'),
  )
  await lockWith({ 'node_modules/example': { version: '1.0.0', integrity: 'sha512-aa' } })
})
afterEach(() => rm(checkout, { recursive: true, force: true }))

const lockWith = (packages: Record<string, unknown>) =>
  writeFile(path.join(checkout, 'package-lock.json'), JSON.stringify({ packages: { '': {}, ...packages } }))

async function npmThat(script: string): Promise<void> {
  const file = path.join(checkout, 'bin/npm')
  await writeFile(file, `#!/bin/bash\n${script}\n`)
  await chmod(file, 0o755)
}

function start() {
  const { PATH, ...env } = cleanEnvironment()
  const child = spawn('bash', [path.join(checkout, 'workers/supervisor/start.sh'), 'start'], {
    cwd: checkout,
    // The address only keeps Debian's packages out of this test.
    env: {
      NODE_ENV: 'test',
      ...env,
      PATH: `${checkout}/bin:${PATH ?? ''}`,
      DATABASE_URL: 'postgres://a@127.0.0.1:1/b',
      MARK: checkout,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let text = ''
  child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()))
  child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()))
  const ended = new Promise<number | null>((resolve) => child.once('close', (code) => resolve(code)))
  return { child, output: () => text, ended }
}

describe('the install before the start', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)('ends on %s with code 0 and leaves no process', async (signal) => {
    await npmThat('sleep 300 & touch began; wait')
    const { child, output, ended } = start()
    await eventually('npm', async () =>
      (await processesWith(checkout)).some((line) => line.includes('sleep')),
    )
    child.kill(signal)
    expect(await ended).toBe(0)
    expect(output()).toContain('Stopped.')
    expect(await processesWith(checkout)).toEqual([])
  })

  it('shows what npm said when it fails, and stops', async () => {
    await npmThat('echo "no such package" >&2; exit 4')
    const { output, ended } = start()
    expect(await ended).toBe(1)
    expect(output()).toContain('no such package')
    expect(output()).toContain('Installing the packages failed (code 4).')
  })

  it('installs nothing when what is there agrees with the lock file', async () => {
    await npmThat('touch installed')
    await mkdir(path.join(checkout, 'node_modules'))
    const there = { 'node_modules/example': { version: '1.0.0', integrity: 'sha512-aa' } }
    await writeFile(
      path.join(checkout, 'node_modules/.package-lock.json'),
      JSON.stringify({ packages: there }),
    )
    const { output, ended } = start()
    await ended
    expect(output()).not.toContain('Installing')
  })

  it('installs when a version in the lock file is another', async () => {
    await npmThat('exit 0')
    await mkdir(path.join(checkout, 'node_modules'))
    const there = { 'node_modules/example': { version: '0.9.0', integrity: 'sha512-bb' } }
    await writeFile(
      path.join(checkout, 'node_modules/.package-lock.json'),
      JSON.stringify({ packages: there }),
    )
    const { output, ended } = start()
    await ended
    expect(output()).toContain('Installing the packages: done in')
  })

  it('says that it runs already when the folder is taken', async () => {
    await npmThat('sleep 300 & wait')
    const first = start()
    await eventually('npm', async () =>
      (await processesWith(checkout)).some((line) => line.includes('sleep')),
    )
    const second = start()
    expect(await second.ended).toBe(1)
    expect(second.output()).toContain('Lidfast already runs from this folder.')
    first.child.kill('SIGTERM')
    expect(await first.ended).toBe(0)
  })
})
