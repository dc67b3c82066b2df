const alphabet = '23456789abcdefghjkmnpqrstvwxyz'

/**
 * An opaque public id of 10 characters, without letters that are misread for one another.
 * @param randomBytes at least 20 bytes of randomness; bytes that would make some letters likelier are left out
 * @throws RangeError when the bytes run out (30 letters of 256: odds of needing more than 40 bytes are below 1e-20)
 */
export function codeFromBytes(randomBytes: Uint8Array): string {
  const fair = 256 - (256 % alphabet.length)
  let code = ''
  for (const byte of randomBytes) {
    if (byte < fair) code += alphabet[byte % alphabet.length] ?? ''
    if (code.length === 10) return code
  }
  throw new RangeError('too few random bytes for a code')
}
