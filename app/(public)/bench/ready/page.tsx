import type { Metadata } from 'next'
import { ReadyBench } from './_components/ready-bench'

export const metadata: Metadata = {
  title: 'Ready',
  description: 'From its weighings: is a roughed blank ready, and if not, about when?',
}

export default function ReadyPage() {
  return <ReadyBench />
}
