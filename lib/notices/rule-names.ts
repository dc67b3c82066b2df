import type { Rule } from './notice'

/** Each rule in a few words, for lists and mails. */
export const ruleNames: Readonly<Record<Rule, string>> = {
  'planned-carry': 'A planned carry is ill-advised',
  'verdict-worse': 'The verdict on a plan gets worse',
  'time-nearly-out': 'The time out is nearly used up',
  'time-out': 'The time out is used up',
  'lock-up': 'Lock-up',
  'last-call': 'Last call',
  'tub-out': 'The tub seems to be out',
  'losing-fit': 'A finished box is losing its fit',
  'shop-unfit': 'The shop is unfit all day',
  'good-hours': 'Good hours now',
  'keep-room-band': 'A keep room is out of its band',
  'damper-than-normal': 'A room is damper than its own normal',
  'mould-risk': 'Mould may grow',
  'too-dry': 'Too dry for green wood',
  'cold-iron': 'Damp may settle on cold iron',
  'blank-ready': 'A blank is ready',
  'weighing-due': 'A weighing is due',
  'sensor-silent': 'A sensor is silent',
  'battery-low': 'A battery is low',
  'refused-messages': 'Messages could not be used',
  test: 'A test',
}
