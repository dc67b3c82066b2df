'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm, useWatch } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import { useAction } from '@/app/_components/use-action'
import { type Role, roleSchema, roleWords } from '@/lib/sites/permissions'
import { roleDeeds } from '@/lib/sites/role-words'
import type { Reader } from '@/lib/sites/reader'
import { type Invitation, newInvitationSchema } from '@/lib/sites/site'

type InviteDialogProps = { reader: Reader; open: boolean; onOpenChange: (open: boolean) => void }

export function InviteDialog({ reader, open, onOpenChange }: InviteDialogProps) {
  const form = useForm({
    resolver: zodResolver(newInvitationSchema),
    defaultValues: { email: '', role: 'hand' as Role },
  })
  const role = useWatch({ control: form.control, name: 'role' })
  const invite = useAction<{ email: string; role: Role }, Invitation>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/invitations`, { method: 'POST', body, idempotencyKey }),
    invalidates: [siteKey(reader.site, 'members')],
    done: (invitation) => `A mail is on its way to ${invitation.email}`,
    onDone: () => {
      form.reset()
      onOpenChange(false)
    },
    errors: 'inline',
  })
  const emailError = form.formState.errors.email?.message ?? invite.problem?.errorOf('email')
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Invite someone"
      description="They get a mail with a link that works for a week, once, and only for that address."
    >
      <form
        noValidate
        className="flex flex-col gap-4"
        onSubmit={form.handleSubmit((values) => {
          invite.act(values)
        })}
      >
        <Field label="E-mail" error={emailError}>
          <Input type="email" autoComplete="off" {...form.register('email')} />
        </Field>
        <Field label="As" hint={roleDeeds[role]}>
          <Select {...form.register('role')}>
            {roleSchema.options.map((option) => (
              <option key={option} value={option}>
                {roleWords[option]}
              </option>
            ))}
          </Select>
        </Field>
        {invite.error && emailError === undefined ? (
          <p role="alert" className="text-warn">
            {invite.problem?.detail ?? 'No answer came. Nothing was lost; press again.'}
          </p>
        ) : null}
        <Button type="submit" variant="filled" pending={invite.pending}>
          Send the invitation
        </Button>
      </form>
    </Dialog>
  )
}
