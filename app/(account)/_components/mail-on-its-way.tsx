'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { type AuthFailure, authFailureWords, authRequest } from './auth-request'
import { FormMessage } from './form-message'

/** After signing up. It says the same whether or not the address had an account, so that nobody can fish for addresses. */
export function MailOnItsWay({ email, callbackURL }: { email: string; callbackURL: string }) {
  const [state, setState] = useState<'waiting' | 'sending' | 'sent' | AuthFailure>('waiting')

  const sendAgain = async () => {
    setState('sending')
    const result = await authRequest('send-verification-email', { email, callbackURL })
    setState(result.ok ? 'sent' : result.failure)
  }

  return (
    <div className="flex flex-col gap-4">
      <p role="status">
        A mail is on its way to <strong>{email}</strong>. Open the link in it and you are signed in. It may
        take a minute, and it may land among the unwanted mail.
      </p>
      {state === 'sent' ? <FormMessage kind="done">Sent again.</FormMessage> : null}
      {state !== 'waiting' && state !== 'sending' && state !== 'sent' ? (
        <FormMessage kind="error">{authFailureWords[state]}</FormMessage>
      ) : null}
      <Button onClick={() => void sendAgain()} pending={state === 'sending'} className="self-start">
        Send it again
      </Button>
    </div>
  )
}
