import {
  batteryLowPct,
  commonBandHighPct,
  commonBandLowPct,
  damperDays,
  keepBandDays,
  keepBandHalfPct,
  losingFitUsedPct,
  mouldTellHumidityPct,
  mouldWarnHumidityPct,
  noTellingDifferencePct,
  refusedPerHour,
  seasonDays,
  tooDryDays,
  tooDryHumidityPct,
} from './policy'
import type { RuleForm } from './rule-form'

/** The rules about rooms, pieces at rest and sensors. */
export const yardRuleForms = {
  'losing-fit': {
    isOn: true,
    words:
      'When a finished box in {rooms} has used {usedPct} of its allowance where it stands, tell the makers, once in {everyDays} at most.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'any room' },
      usedPct: {
        kind: 'number',
        label: 'Used',
        unit: 'used-pct',
        usual: losingFitUsedPct,
        min: 30,
        max: 150,
      },
      everyDays: { kind: 'number', label: 'Once in', unit: 'days', usual: 7, min: 7, max: 90 },
    },
    replay: 'told',
  },
  'keep-room-band': {
    isOn: true,
    words:
      'When {rooms} stays more than {halfPoints} off the middle of its own twelve months for {days}, tell the makers; with under 60 days of record, outside {lowPct} to {highPct}.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a keep room' },
      halfPoints: {
        kind: 'number',
        label: 'Off by more than',
        unit: 'points',
        usual: keepBandHalfPct,
        min: 0.7,
        max: 5,
      },
      days: { kind: 'number', label: 'For', unit: 'days', usual: keepBandDays, min: 1, max: 14 },
      lowPct: {
        kind: 'number',
        label: 'Not below',
        unit: 'emc-pct',
        usual: commonBandLowPct,
        min: 3,
        max: 15,
      },
      highPct: {
        kind: 'number',
        label: 'Not above',
        unit: 'emc-pct',
        usual: commonBandHighPct,
        min: 5,
        max: 25,
      },
    },
    replay: 'record',
  },
  'damper-than-normal': {
    isOn: true,
    words:
      'When {rooms} is damper than in nine of ten days of the same weeks of earlier years, by {points} and for {days}, tell the makers.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a room that wood is kept in' },
      points: {
        kind: 'number',
        label: 'By more than',
        unit: 'points',
        usual: noTellingDifferencePct,
        min: 0.1,
        max: 5,
      },
      days: { kind: 'number', label: 'For', unit: 'days', usual: damperDays, min: 1, max: 14 },
    },
    replay: 'record',
  },
  'mould-risk': {
    isOn: true,
    words:
      'When {rooms} stays damp enough for mould, over {tellRh} for a week or with surfaces over {warnRh} for 30 days, tell the makers; of other rooms once in {elsewhereDays} at most.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'a room that keeps dry work' },
      tellRh: {
        kind: 'number',
        label: 'Over, for a week',
        unit: 'rh-pct',
        usual: mouldTellHumidityPct,
        min: 60,
        max: 95,
      },
      warnRh: {
        kind: 'number',
        label: 'Over, for 30 days',
        unit: 'rh-pct',
        usual: mouldWarnHumidityPct,
        min: 60,
        max: 95,
      },
      elsewhereDays: {
        kind: 'number',
        label: 'Other rooms once in',
        unit: 'days',
        usual: seasonDays,
        min: 7,
        max: 365,
      },
    },
    replay: 'record',
  },
  'too-dry': {
    isOn: true,
    words: 'When {rooms} stays under {rh} for {days}, tell the makers.',
    controls: {
      rooms: {
        kind: 'rooms',
        label: 'Which rooms',
        usual: [],
        noneWords: 'a room with green or resting wood',
      },
      rh: { kind: 'number', label: 'Under', unit: 'rh-pct', usual: tooDryHumidityPct, min: 10, max: 60 },
      days: { kind: 'number', label: 'For', unit: 'days', usual: tooDryDays, min: 1, max: 30 },
    },
    replay: 'record',
  },
  'blank-ready': {
    isOn: true,
    words: 'When a blank in {rooms} is ready, tell the makers, once.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'any room' },
    },
    replay: 'told',
  },
  'weighing-due': {
    isOn: true,
    words:
      'When a blank in {rooms} is due to be weighed, tell the makers, all together, once in {everyDays} at most.',
    controls: {
      rooms: { kind: 'rooms', label: 'Which rooms', usual: [], noneWords: 'any room' },
      everyDays: { kind: 'number', label: 'Once in', unit: 'days', usual: 7, min: 1, max: 30 },
    },
    replay: 'told',
  },
  'sensor-silent': {
    isOn: true,
    words:
      'When a sensor has been silent for {gaps} of its usual gaps, {leastH} at least, tell the makers; at once where a piece is out in its room.',
    controls: {
      gaps: { kind: 'number', label: 'Usual gaps', unit: 'count', usual: 6, min: 3, max: 48 },
      leastH: { kind: 'number', label: 'At least', unit: 'h', usual: 2, min: 1, max: 72 },
    },
    replay: 'record',
  },
  'battery-low': {
    isOn: true,
    words: 'When the battery of a sensor is down to {pct}, tell the makers.',
    controls: {
      pct: { kind: 'number', label: 'Down to', unit: 'charge-pct', usual: batteryLowPct, min: 5, max: 60 },
    },
    replay: 'told',
  },
  'refused-messages': {
    isOn: true,
    words:
      'When a sensor sends messages that can not be used, the first of a day or {perHour} within an hour, tell the makers, once a day.',
    controls: {
      perHour: {
        kind: 'number',
        label: 'Within an hour',
        unit: 'count',
        usual: refusedPerHour,
        min: 2,
        max: 1000,
      },
    },
    replay: 'told',
  },
} as const satisfies Record<string, RuleForm>
