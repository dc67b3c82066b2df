'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Button } from '@/app/_components/ui/button'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { type Forgotten, forgottenSchema } from './account-schemas'
import { type AuthFailure, authFailureWords, authRequest } from './auth-request'
import { FormMessage } from './form-message'

export function ForgottenForm() {
  const [failure, setFailure] = useState<AuthFailure | null>(null)
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useForm<Forgotten>({ resolver: zodResolver(forgottenSchema), defaultValues: { email: '' } })

  const send = form.handleSubmit(async ({ email }) => {
    setFailure(null)
    const result = await authRequest('request-password-reset', { email, redirectTo: '/reset' })
    if (result.ok) setSentTo(email)
    else setFailure(result.failure)
  })

  if (sentTo !== null) {
    return (
      <p role="status">
        If <strong>{sentTo}</strong> has an account here, a mail with a link is on its way. The link works for
        an hour, once.
      </p>
    )
  }
  return (
    <form onSubmit={send} noValidate className="flex flex-col gap-4" aria-label="Ask for a new password">
      {failure ? <FormMessage kind="error">{authFailureWords[failure]}</FormMessage> : null}
      <Field label="E-mail" error={form.formState.errors.email?.message}>
        <Input type="email" autoComplete="username" {...form.register('email')} />
      </Field>
      <Button type="submit" variant="filled" pending={form.formState.isSubmitting}>
        Send me a link
      </Button>
    </form>
  )
}
