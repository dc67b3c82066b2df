import { LoadingState } from '@/app/_components/ui/states'

export default function Loading() {
  return <LoadingState what="Fetching the woods" rows={8} />
}
