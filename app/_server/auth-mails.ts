import 'server-only'
import { roleWords } from '@/lib/sites/permissions'
import type { Invitation } from '@/lib/sites/site'
import { serverConfig } from './env'
import { oneLine, type Mail } from './mail'

// Every link starts with the configured address, never with what a request claims to have been sent to.

export const verificationMail = (to: string, url: string): Mail => ({
  to,
  subject: 'Confirm your address',
  lines: ['Open this link to confirm that this address is yours. It works for an hour.'],
  link: url,
  after: ['If you did not sign up for Lidfast, leave the link alone and nothing happens.'],
})

export const resetMail = (to: string, token: string): Mail => ({
  to,
  subject: 'Set a new password',
  lines: ['Open this link to set a new password. It works once, and for an hour.'],
  link: `${serverConfig().baseUrl}/reset?token=${encodeURIComponent(token)}`,
  after: ['If you did not ask for it, leave the link alone: your password stays as it is.'],
})

/** For an address that signs up again: the page says nothing of it, so only its owner learns that there is an account. */
export const accountExistsMail = (to: string): Mail => ({
  to,
  subject: 'You have an account already',
  lines: [
    'Somebody, most likely you, tried to make a Lidfast account with this address. There is one already.',
    'To sign in, or to set a new password if you have lost it:',
  ],
  link: `${serverConfig().baseUrl}/forgotten`,
})

export const invitationMail = (
  { id, email, role }: Pick<Invitation, 'id' | 'email' | 'role'>,
  siteName: string,
  inviter: string,
): Mail => ({
  to: email,
  subject: `An invitation to ${oneLine(siteName)}`,
  lines: [
    `${oneLine(inviter)} invites you to ${oneLine(siteName)} on Lidfast, as: ${roleWords[role].toLowerCase()}.`,
    'Open this link within a week, and sign in or sign up with this address:',
  ],
  link: `${serverConfig().baseUrl}/invitation/${encodeURIComponent(id)}`,
  after: ['If you do not know the sender, leave the link alone and nothing happens.'],
})
