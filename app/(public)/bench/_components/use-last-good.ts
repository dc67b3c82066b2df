'use client'

import { useState } from 'react'

/**
 * The last answer that could be worked out, so that a page does not jump while a number is being typed.
 * @param key changes whenever the answer does
 * @returns the answer, and whether it is an older one than what is typed
 */
export function useLastGood<Answer>(
  key: string,
  answer: Answer | undefined,
): { shown: Answer | undefined; isOld: boolean } {
  const [last, setLast] = useState({ key, answer })
  if (answer !== undefined && last.key !== key) setLast({ key, answer })
  return { shown: answer ?? last.answer, isOld: answer === undefined }
}
