import { createECDH, randomBytes } from 'node:crypto'
import { chmod, mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises'
import path from 'node:path'
import { z } from 'zod'
import { makeCertificate } from '../push-trap/certificate'
import { trapCertificateSchema, trapFile } from '../push-trap/certificate-file'
import { freePort, isPortFree } from './ports'

/** The ignored folder that holds everything of one installation. */
export interface DataFolder {
  root: string
  postgres: string
  logs: string
  uploads: string
}

export async function openDataFolder(root: string): Promise<DataFolder> {
  const folder = {
    root,
    postgres: path.join(root, 'pg'),
    logs: path.join(root, 'logs'),
    uploads: path.join(root, 'uploads'),
  }
  for (const each of [root, folder.logs, folder.uploads]) await mkdir(each, { recursive: true })
  // The database's own user has to pass through; what is inside stays closed to it.
  await chmod(root, 0o711)
  await chmod(folder.logs, 0o700)
  await chmod(folder.uploads, 0o700)
  return folder
}

const vapidSchema = z.object({ publicKey: z.string().length(87), privateKey: z.string().length(43) })
const firstSecretsSchema = z.object({ databasePassword: z.string().min(16), authSecret: z.string().min(32) })
/** Installations of before pushes have no keys for them yet. */
const secretsSchema = firstSecretsSchema.extend({ vapid: vapidSchema.optional() })
export type Secrets = z.infer<typeof firstSecretsSchema> & { vapid: z.infer<typeof vapidSchema> }

/** Made at the first start and kept: a new database password would not open the old database, nor new keys reach old phones. */
export async function loadSecrets(folder: DataFolder): Promise<Secrets> {
  const file = path.join(folder.root, 'secrets.json')
  const made = () => ({
    databasePassword: randomBytes(24).toString('hex'),
    authSecret: randomBytes(32).toString('hex'),
    vapid: makeVapidKeys(),
  })
  const kept = await loadOrMake(file, secretsSchema, made)
  if (kept.vapid !== undefined) return { ...kept, vapid: kept.vapid }
  const secrets = { ...kept, vapid: makeVapidKeys() }
  await writeJson(file, secrets)
  return secrets
}

/** A P-256 key pair, as RFC 8292 has it: the point uncompressed, the scalar in full. */
function makeVapidKeys(): z.infer<typeof vapidSchema> {
  const pair = createECDH('prime256v1')
  const publicKey = pair.generateKeys('base64url', 'uncompressed')
  // A scalar with leading zeros comes shorter.
  const scalar = Buffer.concat([Buffer.alloc(32), pair.getPrivateKey()]).subarray(-32)
  return { publicKey, privateKey: scalar.toString('base64url') }
}

/** The demo's own push service goes by a certificate of its own, which is trusted for nothing else. */
export const makeTrapCertificate = (folder: DataFolder): Promise<unknown> =>
  loadOrMake(trapFile(folder.root), trapCertificateSchema, () => makeCertificate(new Date()))

const portsSchema = z.object({ database: z.int(), mailTrap: z.int(), pushTrap: z.int().default(0) })
export type Ports = z.infer<typeof portsSchema>

/** The ports of the last start, as long as they are free; else new ones. */
export async function loadPorts(folder: DataFolder): Promise<Ports> {
  const file = path.join(folder.root, 'ports.json')
  const kept = await loadOrMake(file, portsSchema, () => ({ database: 0, mailTrap: 0, pushTrap: 0 }))
  const usable = async (port: number) =>
    port > 0 && (await isPortFree('127.0.0.1', port)) ? port : freePort()
  const ports = {
    database: await usable(kept.database),
    mailTrap: await usable(kept.mailTrap),
    pushTrap: await usable(kept.pushTrap),
  }
  await writeJson(file, ports)
  return ports
}

/** What runs now, for people and tools of this machine: it holds the database's password, so only we may read it. */
export interface RunFile {
  pid: number
  startedAt: string
  mode: string
  webUrl: string
  databaseUrl: string
  mqttUrl: string
  smtpUrl?: string
}

const runFile = (folder: DataFolder) => path.join(folder.root, 'run.json')

export const writeRunFile = (folder: DataFolder, run: RunFile): Promise<void> =>
  writeJson(runFile(folder), run)

export const removeRunFile = (folder: DataFolder): Promise<void> => rm(runFile(folder), { force: true })

async function loadOrMake<T>(file: string, schema: z.ZodType<T>, make: () => T): Promise<T> {
  const text = await readFile(file, 'utf8').catch(() => undefined)
  if (text === undefined) {
    const made = make()
    await writeJson(file, made)
    return made
  }
  const parsed = schema.safeParse(parseJson(text))
  if (!parsed.success)
    throw new Error(`${file} can't be read as what it should be. Restore it from your back-up.`)
  return parsed.data
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}

/** Written beside and moved into place, so that a crash leaves the old or the new file and never half of one. */
async function writeJson(file: string, value: unknown): Promise<void> {
  const beside = `${file}.new`
  await writeFile(beside, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 })
  await rename(beside, file)
}
