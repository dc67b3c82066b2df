import { classNames } from './class-names'

/** `filled` is the one action that best keeps the fit; a question has only one. */
export type ButtonVariant = 'filled' | 'second' | 'quiet' | 'link'

const shape = 'inline-flex min-h-11 items-center justify-center gap-2 rounded text-center'
const looks: Record<ButtonVariant, string> = {
  filled: 'border border-heart bg-heart px-4 font-semibold text-on-heart hover:opacity-90',
  second: 'border border-edge bg-board px-4 font-semibold text-ink hover:border-ink',
  quiet: 'border border-transparent px-3 font-semibold text-ink hover:border-edge',
  link: 'px-1 text-heart underline decoration-1 underline-offset-4 hover:decoration-2',
}
const notPossibleYet = 'border border-dashed border-edge bg-transparent px-4 font-semibold text-ink-soft'

export function buttonClassName(variant: ButtonVariant, notYet = false, extra?: string): string {
  return classNames(shape, notYet ? notPossibleYet : looks[variant], extra)
}
