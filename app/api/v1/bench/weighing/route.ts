import { weighingAnswer, weighingQuerySchema } from '@/lib/bench/weighing'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(weighingQuerySchema, weighingAnswer)
