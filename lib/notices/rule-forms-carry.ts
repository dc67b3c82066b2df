import {
  coldIronK,
  lastCallBeforeQuietMs,
  nextPersonAfterMs,
  tubFallK,
  warnBeforePlannedMs,
  warnEveningBefore,
} from './policy'
import type { RuleForm } from './rule-form'

const minutes = (ms: number): number => ms / 60_000

/** The rules about what goes out and what has to come in. */
export const carryRuleForms = {
  'planned-carry': {
    isOn: true,
    words:
      'When a finished box is about to go where it may lose its fit, tell whoever planned it and the house list, {beforeMin} before and at {eveningAt} the evening before.',
    controls: {
      beforeMin: {
        kind: 'number',
        label: 'How long before',
        unit: 'min',
        usual: minutes(warnBeforePlannedMs),
        min: 10,
        max: 360,
      },
      eveningAt: { kind: 'time', label: 'When, the evening before', usual: warnEveningBefore },
    },
    replay: 'told',
  },
  'verdict-worse': {
    isOn: true,
    words: 'When the verdict on a planned carry gets worse after it was told, tell them again, once.',
    controls: {},
    replay: 'told',
  },
  'time-nearly-out': {
    isOn: true,
    words:
      'When a piece that is out nears its early edge, tell whoever took it out and the first of the house list, a quarter of its time before, {leastMin} at least and {mostMin} at most.',
    controls: {
      leastMin: { kind: 'number', label: 'At least so long before', unit: 'min', usual: 10, min: 5, max: 60 },
      mostMin: { kind: 'number', label: 'At most so long before', unit: 'min', usual: 60, min: 10, max: 240 },
    },
    replay: 'told',
  },
  'time-out': {
    isOn: true,
    words:
      'When a piece has reached its early edge, tell whoever took it out and the first of the house list to bring it in; the rest of the house list if nobody answers within {restAfterMin}. At night wake {wakes}.',
    controls: {
      restAfterMin: {
        kind: 'number',
        label: 'Without an answer for',
        unit: 'min',
        usual: minutes(nextPersonAfterMs),
        min: 5,
        max: 120,
      },
      wakes: {
        kind: 'choice',
        label: 'Who is woken',
        usual: 'box',
        options: [
          { value: 'box', words: 'its maker, once, for a finished box' },
          { value: 'nobody', words: 'nobody' },
        ],
      },
    },
    replay: 'told',
  },
  'lock-up': {
    isOn: true,
    words:
      'At {=lockUpAt}, lock-up, ask the makers and the first of the house list what is still out; the rest of the house list if nobody answers within {restAfterMin}. With nothing logged out, ask {whenNothing}.',
    controls: {
      restAfterMin: {
        kind: 'number',
        label: 'Without an answer for',
        unit: 'min',
        usual: minutes(nextPersonAfterMs),
        min: 5,
        max: 120,
      },
      whenNothing: {
        kind: 'choice',
        label: 'With nothing logged out',
        usual: 'used',
        options: [
          { value: 'used', words: 'if the shop was warmed or opened' },
          { value: 'daily', words: 'every evening' },
          { value: 'never', words: 'never' },
        ],
      },
    },
    replay: 'record',
  },
  'last-call': {
    isOn: true,
    words:
      'Ask everybody once more, the last call, {beforeMin} before quiet hours begin{=quietFrom}, and say what would stay out over the night.',
    controls: {
      beforeMin: {
        kind: 'number',
        label: 'How long before quiet hours',
        unit: 'min',
        usual: minutes(lastCallBeforeQuietMs),
        min: 5,
        max: 120,
      },
    },
    replay: 'record',
  },
  'tub-out': {
    isOn: true,
    words:
      'When the sensor in a lidded tub falls by {fallK} within an hour, or feels like the shop, with no carry in a tub logged, ask whether the tub is out.',
    controls: {
      fallK: { kind: 'number', label: 'A fall of', unit: 'kelvin', usual: tubFallK, min: 2, max: 15 },
    },
    replay: 'told',
  },
  'shop-unfit': {
    isOn: false,
    words:
      'At {at}, when {rooms} will be unfit for finishing all the next day, tell the makers, once a spell.',
    controls: {
      at: { kind: 'time', label: 'When', usual: '18:45' },
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a shop' },
    },
    replay: 'told',
  },
  'good-hours': {
    isOn: false,
    words: 'At {at}, when {rooms} will be {kind} for {hours} or more that day, tell the makers.',
    controls: {
      at: { kind: 'time', label: 'When', usual: '07:30' },
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a shop' },
      kind: {
        kind: 'choice',
        label: 'How fit',
        usual: 'fit',
        options: [
          { value: 'fit', words: 'fit as it is' },
          { value: 'lit', words: 'fit, or fit once it is lit' },
          { value: 'tolerable', words: 'fit or tolerable' },
        ],
      },
      hours: { kind: 'number', label: 'For at least', unit: 'h', usual: 3, min: 1, max: 12 },
    },
    replay: 'told',
  },
  'cold-iron': {
    isOn: true,
    words:
      'When cold iron in {rooms} comes within {marginK} of the dew point of its air, tell the makers, once in {everyDays} at most.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a shop' },
      marginK: { kind: 'number', label: 'Nearer than', unit: 'kelvin', usual: coldIronK, min: 0, max: 5 },
      everyDays: { kind: 'number', label: 'Once in', unit: 'days', usual: 14, min: 1, max: 90 },
    },
    replay: 'record',
  },
} as const satisfies Record<string, RuleForm>
