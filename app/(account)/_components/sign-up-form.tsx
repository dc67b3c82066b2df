'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Button } from '@/app/_components/ui/button'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { type SignUp, signUpSchema } from './account-schemas'
import { type AuthFailure, authFailureWords, authRequest } from './auth-request'
import { FormMessage } from './form-message'
import { MailOnItsWay } from './mail-on-its-way'
import { PasswordInput } from './password-input'

export function SignUpForm({ next, email = '' }: { next: string; email?: string }) {
  const [failure, setFailure] = useState<AuthFailure | null>(null)
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useForm<SignUp>({
    resolver: zodResolver(signUpSchema),
    defaultValues: { name: '', email, password: '' },
  })
  const { errors, isSubmitting } = form.formState
  const callbackURL = `/verify?next=${encodeURIComponent(next)}`

  const signUp = form.handleSubmit(async (values) => {
    setFailure(null)
    const result = await authRequest('sign-up/email', { ...values, callbackURL })
    if (result.ok) setSentTo(values.email)
    else setFailure(result.failure)
  })

  if (sentTo !== null) return <MailOnItsWay email={sentTo} callbackURL={callbackURL} />
  return (
    <form onSubmit={signUp} noValidate className="flex flex-col gap-4" aria-label="Make an account">
      {failure ? <FormMessage kind="error">{authFailureWords[failure]}</FormMessage> : null}
      <Field label="Your name" error={errors.name?.message} hint="What others at your site see.">
        <Input autoComplete="name" {...form.register('name')} />
      </Field>
      <Field
        label="E-mail"
        error={errors.email?.message}
        hint="We send one mail now, to see that it reaches you."
      >
        <Input type="email" autoComplete="username" {...form.register('email')} />
      </Field>
      <Field
        label="Password"
        error={errors.password?.message}
        hint="10 letters or more. Several words do well."
      >
        <PasswordInput autoComplete="new-password" {...form.register('password')} />
      </Field>
      <Button type="submit" variant="filled" pending={isSubmitting}>
        Make an account
      </Button>
    </form>
  )
}
