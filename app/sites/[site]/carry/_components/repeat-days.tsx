import { weekdayNames } from '@/lib/carry/repeat'

type RepeatDaysProps = { weekdays: readonly number[]; onChange: (weekdays: number[]) => void }

/** On which days of the week: seven words to tick. */
export function RepeatDays({ weekdays, onChange }: RepeatDaysProps) {
  return (
    <fieldset>
      <legend className="mb-2 text-label font-semibold">On these days</legend>
      <div className="flex flex-wrap gap-2">
        {weekdayNames.map((name, index) => {
          const day = index + 1
          const isOn = weekdays.includes(day)
          return (
            <label
              key={name}
              className={`inline-flex min-h-11 cursor-pointer items-center gap-2 rounded border px-3 ${isOn ? 'border-heart bg-wash font-semibold' : 'border-edge'}`}
            >
              <input
                type="checkbox"
                className="size-4 accent-heart"
                checked={isOn}
                onChange={() => {
                  onChange(isOn ? weekdays.filter((one) => one !== day) : [...weekdays, day])
                }}
              />
              {name}
            </label>
          )
        })}
      </div>
    </fieldset>
  )
}
