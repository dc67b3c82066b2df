import { createDatabase } from '@/db/client'
import { deletePhone, listPhones, savePhone } from '@/db/queries/push-subscriptions'
import { pushMessageSchema } from '@/lib/notices/push'
import { demoAccounts } from '@/lib/sites/demo'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { storeMail } from '../mail-trap/store'
import { readTrapFile } from './certificate-file'
import { makePhone, type Phone } from './phone'
import { startPushTrap } from './server'

const config = readRunningConfig()
const logger = createLogger('push-trap', config.logLevel)
const { pushTrapPort } = config
if (pushTrapPort === undefined)
  throw new Error('PUSH_TRAP_PORT is not set: it says where the push trap listens.')

const db = createDatabase(config.databaseUrl, {
  max: 2,
  name: 'lidfast push-trap',
  onIdleError: (error) => logger.warn({ err: error }, 'database away'),
})

/** The demo's people each have a made-up phone here, until the demo is removed and they with it. */
const phones = new Map<string, { phone: Phone; email: string }>()
for (const { email } of demoAccounts) phones.set(email.split('@')[0] ?? '', { phone: makePhone(), email })

const trap = await startPushTrap({
  port: pushTrapPort,
  identity: await readTrapFile(config.dataDir),
  keep: async (request) => {
    const known = phones.get(request.phone)
    if (known === undefined) return 410
    const message = pushMessageSchema.parse(JSON.parse(known.phone.read(request.body)))
    await storeMail(db, {
      messageId: '',
      sender: 'On the phone',
      recipients: [known.email],
      subject: message.title,
      textBody: [
        message.body,
        message.actions.map(({ title, token }) => `${title}: ${config.baseUrl}/answer/${token}`).join('\n'),
        `${config.baseUrl}${message.url}`,
        message.silent ? 'Shown without a sound.' : '',
      ]
        .filter(Boolean)
        .join('\n\n'),
      htmlBody: '',
    })
    return 201
  },
})

// Keys are new at each start, and so may the port be: what was signed up before is taken back.
for (const [name, { phone, email }] of phones) {
  const user = await db.selectFrom('user').where('email', '=', email).select('id').executeTakeFirst()
  if (user === undefined) continue
  for (const old of await listPhones(db, user.id))
    if (old.endpoint.startsWith('https://127.0.0.1:')) await deletePhone(db, user.id, old.endpoint)
  await savePhone(
    db,
    {
      userId: user.id,
      endpoint: `${trap.origin}/push/${name}`,
      ...phone.keys,
      device: 'the demo’s phone',
    },
    new Date(),
  )
}
logger.info({ port: pushTrapPort }, 'ready')

onShutdown(
  async () => {
    await trap.close()
    await db.destroy()
  },
  { logger },
)
