import { describe, expect, it } from 'vitest'
import { mailFate, noticeMail } from './mail'

const notice = {
  title: '219 should stay where it is.',
  body: 'It may bind.',
  link: '/carry/abc',
  siteCode: 'site234567',
  siteName: 'Saltmarsh Yard',
}
const hour = 3_600_000

describe('the mail of a notice', () => {
  it('links to the configured origin', () => {
    expect(noticeMail(notice, 'https://lidfast.example.org').text).toContain(
      'https://lidfast.example.org/sites/site234567/carry/abc',
    )
  })

  it('keeps a name with line breaks from becoming a header', () => {
    const { subject } = noticeMail({ ...notice, title: 'Shop\r\nBcc: all@example.org' }, 'https://x.example')
    expect(subject).toBe('Shop Bcc: all@example.org')
  })
})

describe('a mail that has waited', () => {
  const mail = { rule: 'time-out', urgency: 'now', noticeAt: 0, isOver: false } as const

  it('is sent while it is news', () => {
    expect(mailFate(mail, hour)).toEqual({ send: true })
    expect(mailFate(mail, 13 * hour).send).toBe(false)
    expect(mailFate({ ...mail, urgency: 'soon' }, 13 * hour)).toEqual({ send: true })
  })

  it('never says "bring it in" of a piece that is in again', () => {
    expect(mailFate({ ...mail, isOver: true }, hour).send).toBe(false)
    expect(mailFate({ ...mail, rule: 'sensor-silent', isOver: true }, hour).send).toBe(true)
  })
})
