'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Field } from '@/app/_components/ui/field'
import { type NewPassword, newPasswordSchema } from './account-schemas'
import { type AuthFailure, authFailureWords, authRequest } from './auth-request'
import { FormMessage } from './form-message'
import { PasswordInput } from './password-input'

export function ResetForm({ token }: { token: string }) {
  const [failure, setFailure] = useState<AuthFailure | null>(null)
  const [isDone, setIsDone] = useState(false)
  const form = useForm<NewPassword>({
    resolver: zodResolver(newPasswordSchema),
    defaultValues: { password: '' },
  })

  const reset = form.handleSubmit(async ({ password }) => {
    setFailure(null)
    const result = await authRequest('reset-password', { newPassword: password, token })
    if (result.ok) setIsDone(true)
    else setFailure(result.failure)
  })

  if (isDone) {
    return (
      <div className="flex flex-col gap-4">
        <FormMessage kind="done">
          Your new password is kept. Signed-in sessions elsewhere have ended.
        </FormMessage>
        <ButtonLink href="/sign-in" variant="filled">
          Sign in
        </ButtonLink>
      </div>
    )
  }
  return (
    <form onSubmit={reset} noValidate className="flex flex-col gap-4" aria-label="Set a new password">
      {failure ? <FormMessage kind="error">{authFailureWords[failure]}</FormMessage> : null}
      {failure === 'bad-link' ? <ButtonLink href="/forgotten">Ask for a new link</ButtonLink> : null}
      <Field label="New password" error={form.formState.errors.password?.message} hint="10 letters or more.">
        <PasswordInput autoComplete="new-password" {...form.register('password')} />
      </Field>
      <Button type="submit" variant="filled" pending={form.formState.isSubmitting}>
        Keep this password
      </Button>
    </form>
  )
}
