import { createDatabase } from '@/db/client'
import { createLogger } from '@/workers/_shared/logger'
import { startBroker } from '@/workers/broker/broker'

/**
 * The broker as a process of its own, for tests that kill it. It loads everything, says so, and begins when it is
 * told, so that a test may have the next one ready. `dieAtCommit` ends it with SIGKILL between that commit and its
 * acknowledgements.
 */
const [url = '', port = '0', dieAtCommit = '0'] = process.argv.slice(2)
let commits = 0

process.stdin.once('end', () => process.exit(0))
process.stdin.once('data', () => {
  void startBroker({
    db: createDatabase(url, { name: 'broker' }),
    logger: createLogger('broker', 'warn'),
    host: '127.0.0.1',
    port: Number(port),
    afterCommit: async () => {
      commits += 1
      if (commits === Number(dieAtCommit)) process.kill(process.pid, 'SIGKILL')
    },
  }).then(() => process.stdout.write('serving\n'))
})
process.stdout.write('loaded\n')
