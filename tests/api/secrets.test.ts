import { execFile } from 'node:child_process'
import { readdir, readFile } from 'node:fs/promises'
import path from 'node:path'
import { promisify } from 'node:util'
import { describe, expect, inject, it } from 'vitest'
import { call } from '../support/session'

const root = path.resolve(import.meta.dirname, '../..')
const run = promisify(execFile)

async function filesBelow(folder: string): Promise<string[]> {
  const entries = await readdir(folder, { recursive: true, withFileTypes: true })
  return entries.filter((entry) => entry.isFile()).map((entry) => path.join(entry.parentPath, entry.name))
}

async function filesWith(folder: string, words: readonly string[]): Promise<string[]> {
  const found: string[] = []
  for (const file of await filesBelow(folder)) {
    const text = await readFile(file, 'latin1')
    const word = words.find((one) => text.includes(one))
    if (word !== undefined) found.push(`${path.relative(root, file)}: ${word}`)
  }
  return found
}

/** The passwords that this very installation made for itself. */
const livePasswords = () => {
  const { databaseUrl } = inject('stack')
  return [new URL(databaseUrl).password].filter((password) => password.length >= 8)
}

describe('secrets', () => {
  it('of this installation are not in the built program', async () => {
    expect(livePasswords().length).toBeGreaterThan(0)
    const folders = (await readdir(path.join(root, '.next'))).filter(
      (name) => name === 'server' || name === 'static',
    )
    expect(folders.length).toBe(2)
    for (const folder of folders)
      expect(await filesWith(path.join(root, '.next', folder), livePasswords())).toEqual([])
  })

  it('and what only the server knows are not in what browsers get', async () => {
    const serverOnly = [
      'DATABASE_URL',
      'AUTH_SECRET',
      'SMTP_URL',
      'postgres://',
      'secret_hash',
      'insertInto',
      'request_hash',
    ]
    expect(await filesWith(path.join(root, '.next/static'), serverOnly)).toEqual([])
    const maps = (await filesBelow(path.join(root, '.next/static'))).filter((file) => file.endsWith('.map'))
    expect(maps).toEqual([])
  })

  it('are in no file under version control, now or earlier', async () => {
    const { stdout: tracked } = await run('git', ['ls-files'], { cwd: root, maxBuffer: 1 << 24 })
    const odd = tracked
      .split('\n')
      .filter((name) => /(^|\/)(\.env[^/]*|secrets\.json|id_[a-z0-9]+|.*\.(pem|key|p12))$/.test(name))
    expect(odd).toEqual([])
    const pattern =
      '-----BEGIN [A-Z ]*PRIVATE KEY-----|AKIA[0-9A-Z]{16}|gh[pousr]_[A-Za-z0-9]{36}|xox[abp]-[0-9A-Za-z-]{20}'
    const history = await run(
      'git',
      [
        'log',
        '--all',
        '--oneline',
        '--extended-regexp',
        `-G${pattern}`,
        '--',
        '.',
        ':!tests/api/secrets.test.ts',
      ],
      {
        cwd: root,
        maxBuffer: 1 << 24,
      },
    )
    expect(history.stdout).toBe('')
  })

  it('are not in what errors say', async () => {
    const bad = await Promise.all([
      call('POST', '/api/auth/sign-in/email', { rawBody: '{"email":' }),
      call('POST', '/api/auth/reset-password', {
        body: { token: '\u0000', newPassword: 'several words do well' },
      }),
      call('GET', `/api/auth/verify-email?token=${'x'.repeat(1500)}`),
      call('GET', '/api/v1/sites/%00/rooms'),
    ])
    for (const reply of bad) expect(reply.status).toBeLessThan(500)
    // The framework itself gives up on an address that can't be decoded; at least it says nothing.
    const broken = await call('GET', '/api/v1/sites/%E0%A4%A')
    for (const reply of [...bad, broken]) {
      expect(reply.text).not.toMatch(/node_modules|\.ts:\d|at \w+ \(|postgres|SELECT|select \*/)
    }
  })
})
