import { humidityAnswer, humidityQuerySchema } from '@/lib/bench/emc'
import { benchRoute } from '../bench-route'

export const GET = benchRoute(humidityQuerySchema, humidityAnswer)
