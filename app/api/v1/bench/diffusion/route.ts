import { ok } from '@/lib/result'
import { diffusionAnswer, diffusionQuerySchema } from '@/lib/bench/joint'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(diffusionQuerySchema, (query) => ok(diffusionAnswer(query)))
