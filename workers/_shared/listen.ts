import { Client } from 'pg'
import { liveChannel, type LiveMessage, liveMessageSchema } from '@/lib/sites/live'

const retryMs = 5_000

/**
 * Hears what changes. It is a hint only: a message that was missed, while the database was away say, is made up for by
 * the next turn of the clock. Connects anew by itself.
 */
export function listen(
  databaseUrl: string,
  { onMessage, onError }: { onMessage: (message: LiveMessage) => void; onError: (error: unknown) => void },
): { stop(): Promise<void> } {
  let client: Client | undefined
  let timer: NodeJS.Timeout | undefined
  let stopped = false

  const again = (error: unknown) => {
    if (stopped) return
    onError(error)
    client = undefined
    clearTimeout(timer)
    timer = setTimeout(connect, retryMs)
  }
  const connect = () => {
    const fresh = new Client({ connectionString: databaseUrl, application_name: 'listen', keepAlive: true })
    client = fresh
    let failed = false
    const fail = (error: unknown) => {
      if (failed) return
      failed = true
      fresh.end().catch(() => undefined)
      again(error)
    }
    fresh.on('error', fail)
    fresh.on('end', () => fail(new Error('the connection ended')))
    fresh.on('notification', ({ payload }) => {
      const message = liveMessageSchema.safeParse(parsed(payload))
      if (message.success) onMessage(message.data)
    })
    fresh
      .connect()
      .then(() => fresh.query(`listen ${liveChannel}`))
      .catch(fail)
  }
  connect()

  return {
    async stop() {
      stopped = true
      clearTimeout(timer)
      await client?.end().catch(() => undefined)
    },
  }
}

function parsed(payload: string | undefined): unknown {
  try {
    return JSON.parse(payload ?? 'null')
  } catch {
    return null
  }
}
