'use client'

import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useRef } from 'react'
import { toast } from 'sonner'
import { ApiProblem, describeError } from './api'
import { retryKey } from './retry-key'

type ActionOptions<Input, Answer> = {
  run: (input: Input, idempotencyKey: string) => Promise<Answer>
  /** Query keys whose figures this act changes. */
  invalidates?: readonly (readonly unknown[])[]
  /** Words for the toast, when the page itself does not show what was done. */
  done?: string | ((answer: Answer, input: Input) => string)
  onDone?: (answer: Answer, input: Input) => void
  /** Forms show the error beside the field; other acts tell it in a toast. */
  errors?: 'toast' | 'inline'
}

/**
 * One act of a person: sends it, tells what became of it, and has what it changed fetched again.
 * Pressed again after no answer came, it carries the same key, so that it is done once.
 */
export function useAction<Input, Answer>(options: ActionOptions<Input, Answer>) {
  const client = useQueryClient()
  const open = useRef<{ input: string; key: string } | null>(null)

  const mutation = useMutation<Answer, Error, Input>({
    mutationFn: (input) => {
      const text = JSON.stringify(input) ?? ''
      if (open.current?.input !== text) open.current = { input: text, key: retryKey() }
      return options.run(input, open.current.key)
    },
    onSuccess: async (answer, input) => {
      open.current = null
      if (options.done)
        toast.success(typeof options.done === 'string' ? options.done : options.done(answer, input))
      options.onDone?.(answer, input)
      await Promise.all((options.invalidates ?? []).map((queryKey) => client.invalidateQueries({ queryKey })))
    },
    onError: (error) => {
      if (error instanceof ApiProblem) open.current = null
      if (options.errors === 'inline') return
      const { title, detail } = describeError(error)
      toast.error(title, { description: detail })
    },
  })

  return {
    act: mutation.mutate,
    actAsync: mutation.mutateAsync,
    pending: mutation.isPending,
    done: mutation.isSuccess,
    answer: mutation.data,
    error: mutation.error,
    problem: mutation.error instanceof ApiProblem ? mutation.error : null,
    reset: mutation.reset,
  }
}
