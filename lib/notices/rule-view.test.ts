import { describe, expect, it } from 'vitest'
import { ruleSchema } from './notice'
import { choiceOf, ruleForms, settingsSchemaOf, toldRules, valuesOf } from './rule-settings'
import { changedValues, ruleView, valuesOfView } from './rule-view'

const times = { quietFrom: '22:00', quietTo: '07:00', lockUpAt: '18:30' }
const words = (rule: (typeof toldRules)[number], given = times) =>
  ruleView(rule, undefined, given, null)
    .parts.map((part) => ('text' in part ? part.text : `[${String(part.control.value)}]`))
    .join('')

describe('a rule in words', () => {
  it('there is one for everything that is told, but for a test', () => {
    expect([...toldRules, 'test'].toSorted()).toEqual([...ruleSchema.options].toSorted())
  })

  it.each(toldRules)('%s names each of its changeable words once, and no other', (rule) => {
    const named = [...ruleForms[rule].words.matchAll(/\{(\w+)\}/g)].map((match) => match[1])
    expect(named.toSorted()).toEqual(Object.keys(ruleForms[rule].controls).toSorted())
  })

  it.each(toldRules)('%s is valid as it comes', (rule) => {
    expect(settingsSchemaOf(rule).safeParse(valuesOf(rule)).success).toBe(true)
  })

  it('tells the site’s own times, and that there is no last call without quiet hours', () => {
    expect(words('lock-up')).toContain('At 18:30, lock-up')
    expect(words('last-call')).toContain('[30] before quiet hours begin, at 22:00')
    expect(words('last-call', { ...times, quietTo: '22:00' })).toContain('there is no last call')
  })

  it('tells the values that it goes by', () => {
    expect(words('planned-carry')).toContain('[60] before and at [19:00] the evening before')
    expect(words('keep-room-band')).toContain('more than [1.5] off')
  })
})

describe('what a site chooses', () => {
  it('stands in for how the rule comes, word by word', () => {
    const book = new Map([['too-dry', { isOn: false, settings: { rh: 30 } }]])
    expect(choiceOf(book, 'too-dry')).toEqual({ isOn: false, values: { rooms: [], rh: 30, days: 3 } })
    expect(choiceOf(book, 'mould-risk').isOn).toBe(true)
  })

  it('is not counted where it is out of range, as of an older make', () => {
    expect(valuesOf('too-dry', { rh: 400, days: 'three' })).toEqual(valuesOf('too-dry'))
  })

  it('is refused out of range, and for a word that the rule has not', () => {
    expect(settingsSchemaOf('too-dry').safeParse({ rh: 400 }).success).toBe(false)
    expect(settingsSchemaOf('too-dry').safeParse({ fallK: 4 }).success).toBe(false)
    expect(settingsSchemaOf('planned-carry').safeParse({ eveningAt: '25:00' }).success).toBe(false)
  })

  it('is stored only where it differs', () => {
    expect(changedValues('too-dry', { rh: 35, days: 5, rooms: [] })).toEqual({ days: 5 })
  })

  it('is in the view as it would be sent back', () => {
    const own = { isOn: true, settings: { days: 5 }, version: 3 }
    const view = ruleView('too-dry', own, times, null)
    expect(changedValues('too-dry', valuesOfView(view))).toEqual({ days: 5 })
    expect([view.version, view.isUsual]).toEqual([3, false])
  })
})
