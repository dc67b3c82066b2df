import type { Metadata } from 'next'
import { TimeOutBench } from './_components/time-out-bench'

export const metadata: Metadata = {
  title: 'Time out',
  description: 'How long a finished box may stay in other air before its lid may bind.',
}

export default function TimeOutPage() {
  return <TimeOutBench />
}
