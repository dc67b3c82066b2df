import { describe, expect, it } from 'vitest'
import { hashSensorSecret, isSensorSecret, makeSensorSecret } from './sensor-secret'

describe('a sensor secret', () => {
  it('is known again, and no other is', async () => {
    const { secret, hash } = await makeSensorSecret()
    expect(secret).toMatch(/^[2-9a-hjkmnp-tv-z]{24}$/)
    expect(await isSensorSecret(secret, hash)).toBe(true)
    expect(await isSensorSecret(Buffer.from(secret), hash)).toBe(true)
    expect(await isSensorSecret(`${secret}x`, hash)).toBe(false)
    expect(await isSensorSecret('', hash)).toBe(false)
  })

  it('is never stored twice in the same form', async () => {
    expect(await hashSensorSecret('same')).not.toBe(await hashSensorSecret('same'))
  })

  // Made with mosquitto_passwd 2.0.11: `mosquitto_passwd -b -c file user saltmarsh`.
  it('has the form of the password file of Mosquitto 2', async () => {
    const stored =
      '$7$101$vrueNKR0RPZeJNuh$mP03S997h/XFglAKA4lpL5N9SSuBKyxnJmvBIJMNRrwJ57/kyqz/L/MsCfUYhGy2Z7lIj6vx/yiJslpRd4SC1Q=='
    expect(await isSensorSecret('saltmarsh', stored)).toBe(true)
    expect(await isSensorSecret('saltmarsj', stored)).toBe(false)
  })

  it.each([
    '',
    '$6$101$aaaa$bbbb',
    '$7$0$AAAA$AAAA',
    '$7$1e9$AAAA$AAAA',
    '$7$101$AAAA$',
    '$7$101$AAAA$AAAA$x',
  ])('in the form %j matches nothing', async (stored) => {
    expect(await isSensorSecret('secret', stored)).toBe(false)
  })
})
