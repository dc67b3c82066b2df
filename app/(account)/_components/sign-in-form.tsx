'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Button } from '@/app/_components/ui/button'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { TextLink } from '@/app/_components/ui/text-link'
import { type SignIn, signInSchema } from './account-schemas'
import { type AuthFailure, authFailureWords, authRequest } from './auth-request'
import { FormMessage } from './form-message'
import { PasswordInput } from './password-input'

type SignInFormProps = {
  /** Where to go afterwards; checked on the server, so it is one of our own addresses. */
  next: string
  /** Side by side from a tablet's width up, as on the landing page. */
  isWide?: boolean
}

export function SignInForm({ next, isWide = false }: SignInFormProps) {
  const [failure, setFailure] = useState<AuthFailure | null>(null)
  const [isMailSent, setIsMailSent] = useState(false)
  const form = useForm<SignIn>({
    resolver: zodResolver(signInSchema),
    defaultValues: { email: '', password: '' },
  })
  const { errors, isSubmitting, isSubmitSuccessful } = form.formState

  const signIn = form.handleSubmit(async (values) => {
    setFailure(null)
    setIsMailSent(false)
    const result = await authRequest('sign-in/email', values)
    if (result.ok) {
      // A whole load and not a soft one: nothing of an earlier reader may stay in the page's memory.
      window.location.assign(next)
      return
    }
    setFailure(result.failure)
    form.setError('root', { message: result.failure })
  })

  const sendAgain = async () => {
    const result = await authRequest('send-verification-email', {
      email: form.getValues('email'),
      callbackURL: '/verify',
    })
    if (result.ok) setIsMailSent(true)
    else setFailure(result.failure)
  }

  return (
    <form onSubmit={signIn} noValidate className="flex flex-col gap-4" aria-label="Sign in">
      {failure ? <FormMessage kind="error">{authFailureWords[failure]}</FormMessage> : null}
      {isMailSent ? (
        <FormMessage kind="done">A new mail is on its way. Open the link in it.</FormMessage>
      ) : null}
      <div className={isWide ? 'flex flex-col gap-4 md:flex-row md:items-start' : 'flex flex-col gap-4'}>
        <Field label="E-mail" error={errors.email?.message} className="grow">
          <Input
            type="email"
            autoComplete="username"
            placeholder="you@example.org"
            {...form.register('email')}
          />
        </Field>
        <Field label="Password" error={errors.password?.message} className="grow">
          <PasswordInput autoComplete="current-password" {...form.register('password')} />
        </Field>
        <div
          className={
            isWide
              ? 'flex flex-wrap items-center gap-x-4 gap-y-2 md:mt-6'
              : 'flex flex-wrap items-center gap-x-4 gap-y-2'
          }
        >
          <Button
            type="submit"
            variant="filled"
            pending={isSubmitting || isSubmitSuccessful}
            className={isWide ? 'max-md:w-full' : 'w-full'}
          >
            Sign in
          </Button>
          <TextLink href="/forgotten" className="inline-flex min-h-11 items-center">
            I have forgotten it
          </TextLink>
        </div>
      </div>
      {failure === 'not-verified' ? (
        <Button onClick={() => void sendAgain()} className="self-start">
          Send the mail again
        </Button>
      ) : null}
    </form>
  )
}
