import type { Metadata } from 'next'
import { EmcBench } from './_components/emc-bench'

export const metadata: Metadata = {
  title: 'EMC',
  description: 'Where wood ends in an air, and the air that holds wood at a moisture content.',
}

export default function EmcPage() {
  return <EmcBench />
}
