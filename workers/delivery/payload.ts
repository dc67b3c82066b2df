import { z } from 'zod'

/** What the queue hands back of a person's mail job. */
export const personSchema = z.object({ userId: z.string() })
