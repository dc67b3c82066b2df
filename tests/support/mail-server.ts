import type { AddressInfo } from 'node:net'
import { type ParsedMail, simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'

export interface TestMailServer {
  url: string
  mails: ParsedMail[]
  /** While set, every message is refused with this reply. */
  refuseWith: string | undefined
  /** The number of that reply; 450, "not now", unless it says otherwise. */
  refuseCode: number | undefined
  close(): Promise<void>
}

/** A real mail server on loopback that keeps what it gets, or refuses it as long as it is told to. */
export async function startMailServer(): Promise<TestMailServer> {
  const mails: ParsedMail[] = []
  const state: Pick<TestMailServer, 'refuseWith' | 'refuseCode'> = {
    refuseWith: undefined,
    refuseCode: undefined,
  }
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, _session, done) {
      simpleParser(stream).then(
        (mail) => {
          if (state.refuseWith !== undefined) {
            const responseCode = state.refuseCode ?? 450
            return done(Object.assign(new Error(state.refuseWith), { responseCode }))
          }
          mails.push(mail)
          done()
        },
        (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
      )
    },
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.server.address() as AddressInfo
  return Object.assign(state, {
    url: `smtp://127.0.0.1:${port}`,
    mails,
    close: () => new Promise<void>((resolve) => server.close(() => resolve())),
  })
}
