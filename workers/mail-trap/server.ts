import { simpleParser } from 'mailparser'
import { SMTPServer, type SMTPServerAddress } from 'smtp-server'
import type { Logger } from '../_shared/logger'
import { trappedMail, type TrappedMail } from './store'

export interface MailTrapOptions {
  host: string
  port: number
  logger: Logger
  keep: (mail: TrappedMail) => Promise<void>
}

export interface MailTrap {
  close(): Promise<void>
}

const maxMailBytes = 5_000_000

/** A mail server that delivers nothing: every mail that it takes goes to `keep`. */
export async function startMailTrap({ host, port, logger, keep }: MailTrapOptions): Promise<MailTrap> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    size: maxMailBytes,
    disableReverseLookup: true,
    closeTimeout: 2_000,
    onData(stream, session, done) {
      simpleParser(stream)
        .then((mail) => keep(trappedMail(mail, session.envelope.rcptTo.map(addressOf))))
        .then(() => done())
        .catch((error: unknown) => {
          logger.error({ err: error }, 'a mail could not be kept')
          done(new Error('Try again later'))
        })
    },
  })
  server.on('error', (error) => logger.warn({ err: error }, 'a mail connection failed'))
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, resolve)
  })
  return { close: () => new Promise((resolve) => server.close(() => resolve())) }
}

const addressOf = ({ address }: SMTPServerAddress): string => address
