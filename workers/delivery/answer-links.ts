import { signLink } from '@/db/signed-link'
import type { DueDelivery } from '@/db/queries/deliveries'
import type { Answer } from '@/lib/notices/answer'
import { answerLinkMs, answersTo, answerWords } from '@/lib/notices/answers'

/** What signs the links of mails and pushes. */
export interface LinkSource {
  authSecret: string
  baseUrl: string
}

interface SignedAnswer {
  answer: Answer
  words: string
  token: string
}

/** The answers to a notice, each with a link that gives it in this person's name, once. */
export function signedAnswers(
  { authSecret }: LinkSource,
  due: DueDelivery,
  via: 'mail' | 'push',
): SignedAnswer[] {
  // Counted from the notice, so that a repeat holds the very same links.
  const expiresAt = Math.max(due.noticeAt.getTime(), due.dueAt.getTime()) + answerLinkMs
  const { siteId, noticeId, userId } = due
  return answersTo(due).map((answer) => {
    const later = answer === 'later' ? ('hour' as const) : undefined
    return {
      answer,
      words: answer === 'later' ? 'Ask me again in an hour' : answerWords[answer],
      token: signLink(authSecret, {
        kind: 'answer',
        siteId,
        noticeId,
        userId,
        answer,
        later,
        via,
        expiresAt,
      }),
    }
  })
}
