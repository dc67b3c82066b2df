import { readFile } from 'node:fs/promises'
import path from 'node:path'
import { z } from 'zod'

export const trapFile = (dataDir: string): string => path.join(dataDir, 'push-trap.json')

export const trapCertificateSchema = z.object({ key: z.string(), certificate: z.string() })

/** What the supervisor has made for the demo's push service. */
export const readTrapFile = async (dataDir: string) =>
  trapCertificateSchema.parse(JSON.parse(await readFile(trapFile(dataDir), 'utf8')))

export const readTrapCertificate = async (dataDir: string): Promise<string> =>
  (await readTrapFile(dataDir)).certificate
