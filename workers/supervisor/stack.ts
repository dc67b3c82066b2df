import { rm } from 'node:fs/promises'
import path from 'node:path'
import type { Config } from '@/lib/config'
import { markBuilt, needsBuild, sourcesHash } from './build'
import { clusterUrl, createMissingDatabase, databaseAnswers, prepareCluster } from './cluster'
import {
  loadPorts,
  loadSecrets,
  makeTrapCertificate,
  openDataFolder,
  removeRunFile,
  writeRunFile,
  type DataFolder,
} from './data-folder'
import * as parts from './parts'
import { isPortFree, reachable } from './ports'
import { migrate } from './migrate'
import { createSupervisor, type Supervisor } from './supervisor'

export interface StackOptions {
  root: string
  config: Config
  inherited: Record<string, string | undefined>
  mode: 'start' | 'dev'
  resetDemo?: boolean
  /** A course of events for the demo, which is then made anew. */
  scenario?: string
  /** Settings of the private PostgreSQL, for tests. */
  clusterSettings?: Record<string, string>
  say: (sentence: string) => void
}

export interface Stack {
  /** With everything filled in that was generated. */
  config: Config
  env: Record<string, string | undefined>
  supervisor: Supervisor
  /** Brings everything up in order. */
  start(): Promise<void>
  /** Takes everything down in the reverse order. */
  stop(): Promise<void>
  /** Removes the database's folder, wherever it had to be. For tests; nothing may run. */
  removeData(): Promise<void>
}

const databaseName = 'lidfast'

/** Everything of one installation: chooses what it needs and knows the order. Nothing runs before `start`. */
export async function createStack(options: StackOptions): Promise<Stack> {
  const { root, say } = options
  await refuseTakenPorts(options.config)
  const folder = await openDataFolder(path.resolve(root, options.config.dataDir))
  const secrets = await loadSecrets(folder)
  const ports = await loadPorts(folder)
  if (options.config.demo) await makeTrapCertificate(folder)
  const config = fillIn(options.config, folder, { ...secrets, ...ports })
  const env = {
    ...options.inherited,
    ...(options.scenario === undefined ? {} : { FAKE_SCENARIO: options.scenario }),
    ...environmentOf(config),
    NEXT_TELEMETRY_DISABLED: '1',
  }
  const context: parts.PartContext = { root, config, env }
  const supervisor = createSupervisor({ logFolder: folder.logs, say })
  const isReset = options.resetDemo === true
  const ownDatabase = options.config.databaseUrl === undefined
  const ownMail = options.config.smtpUrl === undefined && config.smtpUrl !== undefined

  let clusterFolder: string | undefined
  async function startDatabase(): Promise<void> {
    const at = { port: ports.database, password: secrets.databasePassword }
    const wantedDir = folder.postgres
    const prepared = await prepareCluster({ wantedDir, ...at, settings: options.clusterSettings })
    clusterFolder = prepared.dataDir
    await supervisor.serve({
      name: 'postgres',
      command: prepared.command,
      args: prepared.args,
      cwd: '/',
      env: { PATH: '/usr/bin:/bin', LC_ALL: 'C.UTF-8' },
      ready: () => databaseAnswers(prepared.adminUrl),
      stopSignal: prepared.stopSignal,
      graceMs: 30_000,
    })
    await createMissingDatabase(prepared.adminUrl, databaseName)
  }

  async function openDatabase(): Promise<void> {
    if (ownDatabase) await startDatabase()
    await migrate(config.databaseUrl ?? '', say)
  }

  async function build(): Promise<void> {
    if (options.mode === 'dev' || !(await needsBuild(root))) return
    const hash = await sourcesHash(root)
    await supervisor.run(parts.buildTask(context))
    await markBuilt(root, hash)
  }

  return {
    config,
    env,
    supervisor,
    async start() {
      // The first to fail stops the start; the others are ended by `stop`, and their own failures are no news.
      const opened = openDatabase()
      const pages = Promise.all([build(), opened])
      await Promise.all([
        pages.then(() => supervisor.serve(parts.web(context, options.mode))),
        opened.then(() => supervisor.serve(parts.broker(context))),
        ownMail ? opened.then(() => supervisor.serve(parts.mailTrap(context))) : undefined,
        config.demo
          ? opened.then(() =>
              supervisor.run(parts.demoTask(context, { reset: isReset, scenario: options.scenario })),
            )
          : undefined,
      ])
      // After the demo has made its people, whose phones it is.
      if (config.pushTrapPort !== undefined) await supervisor.serve(parts.pushTrap(context))
      // Not before the demo is whole: these would act on what is half made.
      await supervisor.serve(parts.notices(context))
      await supervisor.serve(parts.delivery(context))
      if (config.demo) await supervisor.serve(parts.fakeSensors(context))
      await writeRunFile(folder, {
        pid: process.pid,
        startedAt: new Date().toISOString(),
        mode: options.mode,
        webUrl: config.baseUrl,
        databaseUrl: config.databaseUrl ?? '',
        mqttUrl: `mqtt://${reachable(config.mqttHost)}:${config.mqttPort}`,
        smtpUrl: ownMail ? config.smtpUrl : undefined,
      })
    },
    async stop() {
      await supervisor.stop()
      await removeRunFile(folder)
    },
    async removeData() {
      if (clusterFolder === undefined) return
      await rm(clusterFolder, { recursive: true, force: true })
      const isElsewhere = path.dirname(clusterFolder) !== folder.root
      if (isElsewhere) await rm(path.dirname(clusterFolder), { recursive: true, force: true })
    },
  }
}

async function refuseTakenPorts(config: Config): Promise<void> {
  const wanted = [
    { variable: 'PORT', host: config.listenHost, port: config.port },
    { variable: 'MQTT_PORT', host: config.mqttHost, port: config.mqttPort },
  ]
  for (const { variable, host, port } of wanted) {
    if (await isPortFree(host, port)) continue
    throw new Error(
      `Port ${port} of ${host} is in use by another program. Stop that one, or choose another port: ` +
        `${variable}=${port + 1} npm start`,
    )
  }
}

interface Made {
  databasePassword: string
  authSecret: string
  database: number
  mailTrap: number
  pushTrap: number
  vapid: { publicKey: string; privateKey: string }
}

function fillIn(given: Config, folder: DataFolder, made: Made): Config {
  const at = { port: made.database, password: made.databasePassword }
  const trap = given.demo ? `smtp://127.0.0.1:${made.mailTrap}` : undefined
  return {
    ...given,
    dataDir: folder.root,
    databaseUrl: given.databaseUrl ?? clusterUrl(at, databaseName),
    authSecret: given.authSecret ?? made.authSecret,
    smtpUrl: given.smtpUrl ?? trap,
    vapid: given.vapid ?? made.vapid,
    pushTrapPort: given.pushTrapPort ?? (given.demo ? made.pushTrap : undefined),
  }
}

/** The configuration as the environment that `parseConfig` reads. */
const environmentOf = (config: Config): Record<string, string | undefined> => ({
  DATABASE_URL: config.databaseUrl,
  PORT: String(config.port),
  LISTEN_HOST: config.listenHost,
  BASE_URL: config.baseUrl,
  MQTT_HOST: config.mqttHost,
  MQTT_PORT: String(config.mqttPort),
  SMTP_URL: config.smtpUrl,
  MAIL_FROM: config.mailFrom,
  LIDFAST_DEMO: config.demo ? 'on' : 'off',
  AUTH_SECRET: config.authSecret,
  AUTH_RATE_LIMIT: String(config.authRateLimit),
  PEER_ADDRESS_HEADER: config.peerAddressHeader,
  VAPID_PUBLIC_KEY: config.vapid?.publicKey,
  VAPID_PRIVATE_KEY: config.vapid?.privateKey,
  PUSH_TRAP_PORT: config.pushTrapPort === undefined ? undefined : String(config.pushTrapPort),
  LOG_LEVEL: config.logLevel,
  DATA_DIR: config.dataDir,
})
