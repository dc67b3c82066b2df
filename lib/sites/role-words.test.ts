import { describe, expect, it } from 'vitest'
import { roleTable } from './role-words'

describe('the table of what each role may do', () => {
  const table = roleTable(['owner', 'maker', 'hand', 'onlooker'])

  it('lets an owner do everything and an onlooker only look', () => {
    expect(table.every((line) => line.may[0])).toBe(true)
    expect(table.map((line) => line.may[3])).toEqual([true, false, false, false, false])
  })

  it('sets maker and hand apart', () => {
    expect(table.map((line) => line.may[1])).toEqual([true, true, true, true, false])
    expect(table.map((line) => line.may[2])).toEqual([true, true, true, false, false])
  })
})
