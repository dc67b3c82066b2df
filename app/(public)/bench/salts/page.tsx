import type { Metadata } from 'next'
import { SaltsBench } from './_components/salts-bench'

export const metadata: Metadata = {
  title: 'Salts',
  description: 'The humidity that wet salts hold in a sealed box, for checking a sensor.',
}

export default function SaltsPage() {
  return <SaltsBench />
}
