'use client'

import { type ReactNode, useState } from 'react'
import { FitCheckAnswers } from '@/app/_components/charts/fit-check-answers'
import { FitCheckRule } from '@/app/_components/charts/fit-check-rule'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Field } from '@/app/_components/ui/field'
import { RichText } from '@/app/_components/ui/rich-text'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { fitAnswers } from '@/lib/fit/fit-answers'
import { fitCheckWords } from '@/lib/fit/fit-check-words'
import { type FitGrade, fitGradeSchema, type PieceDetail } from '@/lib/pieces/piece'
import type { CutQuestion, PieceFit } from '@/lib/pieces/piece-fit'
import type { Reader } from '@/lib/sites/reader'
import { LengthInput, lengthError } from '../../_components/length-input'

type CutSheetProps = {
  reader: Reader
  piece: PieceDetail
  initial: PieceFit
  children?: (diameterMm: number | null) => ReactNode
}

const grades: Readonly<Record<FitGrade, string>> = {
  suction: 'a suction lid',
  snap: 'a snap lid',
  snug: 'a snug lid',
  easy: 'an easy lid',
  loose: 'a loose lid',
  threaded: 'a threaded lid',
}

const isJointWidth = (diameterMm: number | null): diameterMm is number =>
  diameterMm !== null && diameterMm >= 5 && diameterMm <= 600

/** Before the joint is cut, or cut anew: whether its wood is where its keep room's year leaves the fit alone. */
export function CutSheet({ reader, piece, initial, children }: CutSheetProps) {
  const [grade, setGrade] = useState<FitGrade>(piece.fitGrade ?? 'snug')
  const [diameterMm, setDiameter] = useState(piece.jointDiameterMm)
  const query = new URLSearchParams({ fitGrade: grade })
  if (isJointWidth(diameterMm)) query.set('diameterMm', String(diameterMm))
  const isAsFirst = grade === piece.fitGrade && diameterMm === piece.jointDiameterMm
  const { data: fit = initial } = useSiteQuery<PieceFit>({
    site: reader.site,
    area: 'pieces',
    key: ['fit', piece.id, query.toString()],
    path: `/pieces/${piece.id}/fit?${query.toString()}`,
    initial: isAsFirst ? initial : undefined,
    keepLast: true,
  })
  const isWide = diameterMm === null || isJointWidth(diameterMm)
  return (
    <Sheet
      id="cut"
      title="May I cut it?"
      aside={piece.stage === 'box' ? 'If it is to be re-trued' : undefined}
    >
      <div className="flex flex-wrap items-end gap-x-6 gap-y-3">
        <FlowingSentence>
          I want{' '}
          <SentenceSelect
            label="The fit that is wanted"
            value={grade}
            onChange={(event) => {
              setGrade(fitGradeSchema.catch(grade).parse(event.target.value))
            }}
          >
            {fitGradeSchema.options.map((value) => (
              <option key={value} value={value}>
                {grades[value]}
              </option>
            ))}
          </SentenceSelect>
          .
        </FlowingSentence>
        <Field
          label="Joint, outside of the spigot"
          className="w-48"
          error={isWide ? undefined : lengthError(diameterMm, '5 to 600 mm across')}
        >
          <LengthInput valueMm={piece.jointDiameterMm} onChange={setDiameter} units={reader.units} />
        </Field>
      </div>
      <div className="mt-4">
        <Answer cut={fit.cut} piece={piece} reader={reader} />
      </div>
      {children ? <div className="mt-6 border-t border-line pt-5">{children(diameterMm)}</div> : null}
    </Sheet>
  )
}

type AnswerProps = { cut: CutQuestion; piece: PieceDetail; reader: Reader }

function Answer({ cut, piece, reader }: AnswerProps) {
  if (cut.kind === 'ask-diameter')
    return <p className="text-ink-soft">Tell how wide the joint is to be: a wide one moves more.</p>
  if (cut.kind === 'unknown') return <p className="max-w-words text-ink-soft">{cut.words}</p>
  const { input, check, assumed } = cut
  const words = fitCheckWords(input, check, reader.units, assumed)
  return (
    <div className="flex flex-col gap-5">
      <div aria-live="polite">
        <p className="text-verdict">
          <RichText parts={words.headline} />
        </p>
        <p className="mt-1 max-w-words text-ink-soft">{words.second}</p>
      </div>
      {check.kind === 'verdict' ? (
        <>
          <FitCheckRule
            input={input}
            check={check}
            pieceName={`${piece.number} now`}
            title="Its wood beside the year"
          />
          <FitCheckAnswers answers={fitAnswers(input, check, reader.units)} />
        </>
      ) : null}
      {words.assumed.length > 0 ? (
        <p className="max-w-words text-label text-ink-soft">
          Judged against the year of {cut.against.name}. Assumed: {words.assumed.join(' ')}
        </p>
      ) : null}
    </div>
  )
}
