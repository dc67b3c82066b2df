import type { Metadata } from 'next'
import { ShopBench } from './_components/shop-bench'

export const metadata: Metadata = {
  title: 'Shop',
  description: 'How warm or how dry a shop would have to be for wood in it to match the house.',
}

export default function ShopPage() {
  return <ShopBench />
}
