import { z } from 'zod'
import type { Learned } from './learned-words'

/** How the lid turned after a carry, or at any other time: what the site's wood is learned from. */
export const turnedSchema = z.enum(['as-before', 'tighter', 'binds', 'looser'])
export type Turned = z.infer<typeof turnedSchema>

export const turnedWords: Record<Turned, string> = {
  'as-before': 'turned as before',
  tighter: 'tighter a quarter turn on',
  binds: 'bound a quarter turn on',
  looser: 'looser than before',
}

export const newOutcomeSchema = z.strictObject({
  turned: turnedSchema,
  /** The carry that it came back from; left out for a turn at any other time. */
  carryId: z.string().optional(),
  note: z.string().trim().max(1000).default(''),
})
export type NewOutcome = z.infer<typeof newOutcomeSchema>

export const outcomeSchema = z.object({
  id: z.string(),
  at: z.iso.datetime(),
  turned: turnedSchema,
  carryId: z.string().nullable(),
  note: z.string(),
  by: z.string().nullable(),
  isUndone: z.boolean(),
})
export type Outcome = z.infer<typeof outcomeSchema>

/** How the lids of a piece turned, newest first, and what the site has learned of such wood; null: nothing yet. */
export type PieceOutcomes = { readonly items: Outcome[]; readonly learned: Learned | null }
