const deeds = [
  [
    'See what each room does to wood',
    'Temperature and humidity become the one figure that wood obeys: the moisture content it would end at.',
  ],
  ['Ask before you carry', 'For each box: fine, keep it short until a time, or leave it where it is.'],
  ['Bring it back in time', 'The house hears it too; lock-up asks what is still out.'],
  [
    'Trust the numbers',
    'Sensors are watched; no fresh reading means no green light, and every doubt is shown.',
  ],
  ['Share the work', 'The person in the house, a helper, a club: each sees and does what they should.'],
] as const

export function WhatItDoes() {
  return (
    <dl className="border-t border-ink max-sm:mx-4">
      {deeds.map(([name, words]) => (
        <div
          key={name}
          className="grid gap-x-8 gap-y-1 border-b border-line py-3 md:grid-cols-[minmax(0,3fr)_minmax(0,7fr)]"
        >
          <dt className="text-[18px] font-semibold">{name}</dt>
          <dd className="text-ink-soft">{words}</dd>
        </div>
      ))}
    </dl>
  )
}
