import { createHash } from 'node:crypto'
import { readFile, readdir, writeFile } from 'node:fs/promises'
import path from 'node:path'

/** Everything that `next build` reads. */
const folders = ['app', 'lib', 'db', 'public']
const files = [
  'proxy.ts',
  'instrumentation.ts',
  'next.config.mjs',
  'tailwind.config.ts',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
]

const stampOf = (root: string) => path.join(root, '.next', 'lidfast-sources')

export async function sourcesHash(root: string): Promise<string> {
  const names = [...files]
  for (const folder of folders) {
    const entries = await readdir(path.join(root, folder), { recursive: true, withFileTypes: true }).catch(
      () => [],
    )
    for (const entry of entries) {
      const isSource = entry.isFile() && !/\.test\.tsx?$/.test(entry.name)
      if (isSource) names.push(path.relative(root, path.join(entry.parentPath, entry.name)))
    }
  }
  const hash = createHash('sha256')
  for (const name of names.sort()) {
    const content = await readFile(path.join(root, name)).catch(() => undefined)
    if (content) hash.update(`${name}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

/** Whether the pages in `.next` were built from other sources than those that are here now. */
export async function needsBuild(root: string): Promise<boolean> {
  const stamp = await readFile(stampOf(root), 'utf8').catch(() => '')
  return stamp.trim() !== (await sourcesHash(root))
}

/** The stamp lies inside `.next` and so goes with it; it is written only after a whole build. */
export const markBuilt = async (root: string, hash: string): Promise<void> =>
  writeFile(stampOf(root), `${hash}\n`)
