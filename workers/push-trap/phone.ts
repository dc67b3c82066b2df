import { createDecipheriv, createECDH, hkdfSync, randomBytes } from 'node:crypto'

/** A made-up browser: the keys that it would give out, and what it reads with them. */
export interface Phone {
  /** Base64url, as a browser's subscription holds them. */
  keys: { p256dh: string; auth: string }
  /** @throws when the message was not encrypted for this phone */
  read(body: Buffer): string
}

const saltBytes = 16
const tagBytes = 16

/** Reads messages as a browser does: aes128gcm (RFC 8188) with the keys of RFC 8291. One record, as pushes have. */
export function makePhone(): Phone {
  const own = createECDH('prime256v1')
  const publicKey = own.generateKeys()
  const auth = randomBytes(16)
  return {
    keys: { p256dh: publicKey.toString('base64url'), auth: auth.toString('base64url') },
    read(body) {
      const salt = body.subarray(0, saltBytes)
      // After the salt: the record's size in four bytes, and the length of the sender's key in one.
      const keyStart = saltBytes + 5
      const keyEnd = keyStart + body.readUInt8(saltBytes + 4)
      const sender = body.subarray(keyStart, keyEnd)
      const shared = own.computeSecret(sender)
      const info = Buffer.concat([Buffer.from('WebPush: info\0'), publicKey, sender])
      const secret = Buffer.from(hkdfSync('sha256', shared, auth, info, 32))
      const key = Buffer.from(hkdfSync('sha256', secret, salt, 'Content-Encoding: aes128gcm\0', 16))
      const nonce = Buffer.from(hkdfSync('sha256', secret, salt, 'Content-Encoding: nonce\0', 12))
      const sealed = body.subarray(keyEnd)
      const decipher = createDecipheriv('aes-128-gcm', key, nonce)
      decipher.setAuthTag(sealed.subarray(sealed.length - tagBytes))
      const padded = Buffer.concat([
        decipher.update(sealed.subarray(0, sealed.length - tagBytes)),
        decipher.final(),
      ])
      // The text ends at the last byte that is not zero: a 2, which marks the last record.
      return padded.subarray(0, padded.lastIndexOf(2)).toString('utf8')
    },
  }
}
