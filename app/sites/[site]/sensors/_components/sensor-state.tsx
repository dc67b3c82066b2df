import { Mark } from '@/app/_components/ui/mark'
import type { Mark as MarkKind } from '@/lib/notices/notice'
import type { SensorStateWord } from '@/lib/sensors/sensor'
import { sensorStateWords } from '@/lib/sensors/wording'

const marks: Record<SensorStateWord, MarkKind> = {
  alive: 'fine',
  late: 'keep-short',
  silent: 'silent',
  'never-heard': 'unknown',
  retired: 'unknown',
}

export function SensorState({ state }: { state: SensorStateWord }) {
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      <Mark kind={marks[state]} />
      {sensorStateWords[state]}
    </span>
  )
}
