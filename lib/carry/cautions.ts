/** Shown with every carry; none can be put away for good. */
export const carryCautions: readonly string[] = [
  'If the lathe is running, wait where you can be seen before you go in (HSE on machinery; local rules come first).',
  'Never force, lever or heat a swollen lid: line the grain up, keep the parts side by side, try it cold in about two days. It usually comes back, not always.',
  'Warming the shop: never leave a heater unattended near dust or solvents, nor run it on a long lead; an unflued one gives off carbon monoxide and wets the air (HSE, NFPA, Electrical Safety First).',
]
