import { generateKeyPairSync, randomBytes, sign } from 'node:crypto'

/** A certificate for this machine alone, signed by itself, and its key: both PEM. */
export interface TrapCertificate {
  key: string
  certificate: string
}

// X.509 (RFC 5280) in DER (ITU-T X.690): only what a TLS server on 127.0.0.1 needs, so that nothing has to be installed.
const der = (tag: number, ...parts: readonly Buffer[]): Buffer => {
  const content = Buffer.concat(parts)
  const { length } = content
  const size = length < 128 ? [length] : length < 256 ? [0x81, length] : [0x82, length >> 8, length & 0xff]
  return Buffer.concat([Buffer.from([tag, ...size]), content])
}
const sequence = (...parts: Buffer[]) => der(0x30, ...parts)
const set = (...parts: Buffer[]) => der(0x31, ...parts)
const oid = (hex: string) => der(0x06, Buffer.from(hex, 'hex'))
const text = (words: string) => der(0x0c, Buffer.from(words))
const octets = (content: Buffer) => der(0x04, content)
const isTrue = der(0x01, Buffer.from([0xff]))
/** GeneralizedTime, to the second: "20260305130000Z". */
const time = (at: Date) =>
  der(
    0x18,
    Buffer.from(
      at
        .toISOString()
        .replace(/\.\d+Z$/, 'Z')
        .replace(/[-:T]/g, ''),
    ),
  )

const ecdsaWithSha256 = '2a8648ce3d040302'
const commonName = '550403'
const subjectAltName = '551d11'
const basicConstraints = '551d13'

const dayMs = 86_400_000
const validDays = 3_650

export function makeCertificate(now: Date): TrapCertificate {
  const { privateKey, publicKey } = generateKeyPairSync('ec', { namedCurve: 'P-256' })
  const name = sequence(set(sequence(oid(commonName), text('Lidfast demo push'))))
  const algorithm = sequence(oid(ecdsaWithSha256))
  const serial = der(0x02, Buffer.concat([Buffer.from([0x01]), randomBytes(15)]))
  const validity = sequence(
    time(new Date(now.getTime() - dayMs)),
    time(new Date(now.getTime() + validDays * dayMs)),
  )
  const extensions = sequence(
    sequence(oid(basicConstraints), isTrue, octets(sequence(isTrue))),
    sequence(oid(subjectAltName), octets(sequence(der(0x87, Buffer.from([127, 0, 0, 1]))))),
  )
  const toSign = sequence(
    der(0xa0, der(0x02, Buffer.from([2]))),
    serial,
    algorithm,
    name,
    validity,
    name,
    publicKey.export({ type: 'spki', format: 'der' }),
    der(0xa3, extensions),
  )
  const signature = der(0x03, Buffer.from([0]), sign('sha256', toSign, privateKey))
  const certificate = sequence(toSign, algorithm, signature).toString('base64')
  return {
    key: privateKey.export({ type: 'pkcs8', format: 'pem' }).toString(),
    certificate: `-----BEGIN CERTIFICATE-----\n${certificate.replace(/(.{64})/g, '$1\n').trimEnd()}\n-----END CERTIFICATE-----\n`,
  }
}
