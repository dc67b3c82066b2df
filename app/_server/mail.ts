import 'server-only'
import { createTransport, type Transporter } from 'nodemailer'
import { serverConfig } from './env'
import { log } from './log'

export interface Mail {
  to: string
  subject: string
  /** Paragraphs of plain words. */
  lines: readonly string[]
  /** Stands on a line of its own after the lines. */
  link?: string
  after?: readonly string[]
}

let transport: Transporter | undefined

/** Sends one mail at once. Throws when it can't be handed over. */
export async function sendMail(mail: Mail): Promise<void> {
  const { smtpUrl, mailFrom } = serverConfig()
  if (smtpUrl === undefined) {
    log().warn('a mail was not sent: SMTP_URL is not set')
    return
  }
  transport ??= createTransport({
    url: smtpUrl,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 20_000,
    // Names that people chose stand in mails: they must not pull in a file or an address of this machine.
    disableFileAccess: true,
    disableUrlAccess: true,
  })
  const paragraphs = [...mail.lines, ...(mail.link === undefined ? [] : [mail.link]), ...(mail.after ?? [])]
  await transport.sendMail({
    from: mailFrom,
    to: { name: '', address: mail.to },
    subject: oneLine(mail.subject),
    text: `${paragraphs.join('\n\n')}\n`,
    html: htmlOf(mail),
  })
}

/** Sends it without holding up the answer, so that its timing doesn't tell whether an address has an account. */
export function sendMailSoon(mail: Mail): void {
  sendMail(mail).catch((error: unknown) => log().error({ err: error }, 'a mail could not be sent'))
}

/** A line break in a subject would begin a header of its own. */
export const oneLine = (text: string): string =>
  text
    .replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ')
    .trim()
    .slice(0, 200)

const escapes: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
}
const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => escapes[sign] ?? '')

function htmlOf({ lines, link, after = [] }: Mail): string {
  const paragraph = (text: string) => `<p>${escapeHtml(text)}</p>`
  const anchor = link === undefined ? '' : `<p><a href="${escapeHtml(link)}">${escapeHtml(link)}</a></p>`
  return lines.map(paragraph).join('') + anchor + after.map(paragraph).join('')
}
