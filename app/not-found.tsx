import { PublicShell } from './_components/layout/public-shell'
import { ButtonLink } from './_components/ui/button-link'
import { PageSentence } from './_components/ui/page-sentence'

export default function NotFound() {
  return (
    <PublicShell>
      <PageSentence>There is nothing at this address, or it is not yours to see.</PageSentence>
      <p className="max-w-words px-4 text-ink-soft sm:px-0">
        Nothing was lost. If someone sent you the address, ask them which place it belongs to, and sign in as
        a member of it.
      </p>
      <p className="px-4 sm:px-0">
        <ButtonLink href="/" variant="filled">
          To the front page
        </ButtonLink>
      </p>
    </PublicShell>
  )
}
