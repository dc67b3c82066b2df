import { z } from 'zod'

export const answerSchema = z.enum(['in', 'going', 'cant', 'later', 'nothing'])
export type Answer = z.infer<typeof answerSchema>
