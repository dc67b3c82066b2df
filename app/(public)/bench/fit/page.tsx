import type { Metadata } from 'next'
import { FitBench } from './_components/fit-bench'

export const metadata: Metadata = {
  title: 'Lid fit',
  description: 'Whether a lid still turns after its wood has moved, and how far round.',
}

export default function FitPage() {
  return <FitBench />
}
