import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cappedUntil, fateOf, type MailedNotice, noticeMail } from './mail'

const notice: MailedNotice = {
  urgency: 'soon',
  title: '219 should stay where it is.',
  body: 'It may bind.',
  link: '/carry/abc',
  answers: [],
}
const frame = {
  baseUrl: 'https://lidfast.example.org',
  siteCode: 'site234567',
  siteName: 'Saltmarsh Yard',
  unsubscribeUrl: 'https://lidfast.example.org/unsubscribe/xyz',
}
const hour = 3_600_000

describe('the mail of notices', () => {
  it('links to the configured origin, in both of its forms', () => {
    const { text, html } = noticeMail([notice], frame)
    expect(text).toContain('https://lidfast.example.org/sites/site234567/carry/abc')
    expect(html).toContain('href="https://lidfast.example.org/sites/site234567/carry/abc"')
  })

  it('keeps names with line breaks from becoming headers, whatever they hold', () => {
    const title = 'Shop\r\nBcc: all@example.org'
    expect(noticeMail([{ ...notice, title }], frame).subject).toBe('Shop Bcc: all@example.org')
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.integer({ min: 1, max: 30 }), (name, count) => {
        const { subject } = noticeMail(
          Array.from({ length: count }, () => ({ ...notice, title: name })),
          frame,
        )
        expect(subject).not.toMatch(/[\r\n\p{Cc}\u2028\u2029]/u)
        expect(subject.length).toBeLessThanOrEqual(180)
      }),
    )
  })

  it('writes names as text, never as marks of the page', () => {
    const { html } = noticeMail([{ ...notice, title: '<b>207</b>', body: '"><script>' }], {
      ...frame,
      siteName: '<img src=x>',
    })
    expect(html).not.toMatch(/<(b|script|img)\b/)
  })

  it('names the most pressing, tells each, and counts those that are too many to tell', () => {
    const many = [
      ...Array.from({ length: 300 }, (_, n) => ({
        ...notice,
        title: `Weigh ${String(n)}.`,
        urgency: 'whenever' as const,
      })),
      { ...notice, title: 'Bring 207 in now.', urgency: 'now' as const },
    ]
    const { subject, text } = noticeMail(many, frame)
    expect(subject).toBe('Bring 207 in now. (and 300 more)')
    expect(text).toMatch(/^Bring 207 in now\./)
    expect(text).toContain('Weigh 98.')
    expect(text).not.toContain('Weigh 99.')
    expect(text).toContain('And 201 more, on the page Notices')
  })

  it('offers the answers as links', () => {
    const answers = [{ words: 'It’s in', url: 'https://lidfast.example.org/answer/t' }]
    const { text, html } = noticeMail([{ ...notice, answers }], frame)
    expect(text).toContain('It’s in: https://lidfast.example.org/answer/t')
    expect(html).toContain('<a href="https://lidfast.example.org/answer/t">It’s in</a>')
  })
})

describe('what has waited', () => {
  const one = { rule: 'time-out', urgency: 'now', dueAt: 0, isOver: false, isTaken: false } as const

  it('is sent while it is news', () => {
    expect(fateOf(one, hour).kind).toBe('send')
    expect(fateOf(one, 13 * hour).kind).toBe('give-up')
    expect(fateOf({ ...one, urgency: 'soon' }, 13 * hour).kind).toBe('send')
  })

  it('never says "bring it in" of a piece that is in again, nor of what somebody has in hand', () => {
    expect(fateOf({ ...one, isOver: true }, hour).kind).toBe('let-go')
    expect(fateOf({ ...one, isTaken: true }, hour).kind).toBe('let-go')
    expect(fateOf({ ...one, rule: 'sensor-silent', isOver: true }, hour).kind).toBe('send')
  })
})

describe('the cap', () => {
  const times = (count: number) => Array.from({ length: count }, (_, n) => n * 60_000)
  it('keeps some of the hour’s messages for what presses', () => {
    const now = 20 * 60_000
    expect(cappedUntil(times(7), 'soon', now)).toBeNull()
    expect(cappedUntil(times(8), 'soon', now)).toBe(hour)
    expect(cappedUntil(times(8), 'now', now)).toBeNull()
    expect(cappedUntil(times(12), 'now', now)).toBe(hour)
  })
  it('counts the last hour alone, and always ends', () => {
    expect(cappedUntil(times(12), 'now', 2 * hour)).toBeNull()
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 2 * hour })), (sent) => {
        const until = cappedUntil(sent, 'whenever', 2 * hour)
        if (until === null) return
        expect(until).toBeGreaterThan(2 * hour)
        expect(until).toBeLessThanOrEqual(3 * hour)
      }),
    )
  })
})
