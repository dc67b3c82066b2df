import { mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { build } from 'vite'
import { root } from './stack'

export interface Bundle {
  file: string
  remove(): Promise<void>
}

/** A program with all that it imports in one file: it starts in a fifth of the time, for tests that start it often. */
export async function bundle(entry: string): Promise<Bundle> {
  const outDir = await mkdtemp(path.join(os.tmpdir(), 'lidfast-bundle-'))
  await build({
    configFile: false,
    root,
    logLevel: 'error',
    resolve: { alias: { '@': root } },
    ssr: { noExternal: true, external: ['pg-native'] },
    build: {
      ssr: entry,
      outDir,
      emptyOutDir: true,
      minify: false,
      rollupOptions: { output: { entryFileNames: 'main.mjs' } },
    },
  })
  return { file: path.join(outDir, 'main.mjs'), remove: () => rm(outDir, { recursive: true, force: true }) }
}
