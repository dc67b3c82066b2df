import type { Metadata } from 'next'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { workedExamples } from '@/lib/method/examples'
import { Comparisons } from './_components/comparisons'
import { ContentsList } from './_components/contents-list'
import { DefaultsTables } from './_components/defaults-tables'
import { Formula } from './_components/formula'
import { NotCovered } from './_components/not-covered'
import { methodSections } from './_components/sections'
import { StatusWords } from './_components/status-words'
import { Worked } from './_components/worked-example'

export const metadata: Metadata = {
  title: 'How it works things out',
  description: 'Every formula behind Lidfast, with its source, its range and how far it may be out.',
}

/** The papers of the model. Public: whoever is told a figure may ask where it is from. */
export default function MethodPage() {
  const examples = workedExamples()
  return (
    <PublicShell
      actions={
        <>
          <TextLink href="/bench" className="no-print inline-flex min-h-11 items-center">
            The open bench
          </TextLink>
          <TextLink href="/sign-in" className="no-print inline-flex min-h-11 items-center">
            Sign in
          </TextLink>
        </>
      }
    >
      <PageSentence above="How it works things out">
        Every figure that Lidfast tells comes from one model. Here it is:{' '}
        <strong>what each formula says</strong>, where it is from, and <strong>how far it may be out</strong>.
      </PageSentence>
      <div className="grid items-start gap-7 lg:grid-cols-[220px_minmax(0,1fr)]">
        <ContentsList />
        <div className="flex min-w-0 flex-col gap-7">
          <StatusWords />
          {methodSections.map((section) => (
            <Sheet key={section.id} id={section.id} title={section.title} className="scroll-mt-6">
              <div className="flex flex-col gap-8">
                <p className="max-w-words">{section.intro}</p>
                {section.formulas.map((facts) => (
                  <Formula key={facts.id} facts={facts} />
                ))}
                {examples
                  .filter((example) => example.id === section.id)
                  .map((example) => (
                    <Worked key={example.id} example={example} of={section.title} />
                  ))}
              </div>
            </Sheet>
          ))}
          <Comparisons />
          <DefaultsTables />
          <NotCovered />
        </div>
      </div>
    </PublicShell>
  )
}
