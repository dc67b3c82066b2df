'use client'

import { useState } from 'react'

/**
 * An answer worked out once for each question, and the last one that there was while a number is being typed, so that
 * the page does not jump.
 * @param key the question; the answer is worked out anew when it changes
 * @param answerOf undefined where something is refused
 * @returns the answer, and whether it is an older one than what is typed
 */
export function useLastGood<Answer>(
  key: string,
  answerOf: () => Answer | undefined,
): { shown: Answer | undefined; isOld: boolean } {
  const [last, setLast] = useState(() => {
    const answer = answerOf()
    return { key, good: answer, isOld: answer === undefined }
  })
  if (last.key !== key) {
    const answer = answerOf()
    setLast({ key, good: answer ?? last.good, isOld: answer === undefined })
  }
  return { shown: last.good, isOld: last.isOld }
}
