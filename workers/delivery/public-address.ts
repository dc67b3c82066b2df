import { lookup, type LookupAddress } from 'node:dns'
import { Agent } from 'node:https'
import { BlockList, isIP, type LookupFunction } from 'node:net'

/** Networks that no push service stands in (RFC 6890): a subscription must not make us knock at doors behind ours. */
const closed = new BlockList()
for (const [network, prefix] of [
  ['0.0.0.0', 8],
  ['10.0.0.0', 8],
  ['100.64.0.0', 10],
  ['127.0.0.0', 8],
  ['169.254.0.0', 16],
  ['172.16.0.0', 12],
  ['192.0.0.0', 24],
  ['192.168.0.0', 16],
  ['198.18.0.0', 15],
  ['224.0.0.0', 3],
] as const)
  closed.addSubnet(network, prefix, 'ipv4')
for (const [network, prefix] of [
  ['::', 128],
  ['::1', 128],
  ['64:ff9b::', 96],
  ['fc00::', 7],
  ['fe80::', 10],
  ['ff00::', 8],
] as const)
  closed.addSubnet(network, prefix, 'ipv6')

/** IPv4 addresses written as IPv6 count as what they are. */
export function isPublicAddress(address: string): boolean {
  const family = isIP(address)
  return family !== 0 && !closed.check(address, family === 6 ? 'ipv6' : 'ipv4')
}

/** Looks the name up at the moment of connecting, so that a name can't say one address when asked and another when used. */
const publicLookup: LookupFunction = (hostname, options, done) => {
  lookup(hostname, { ...options, all: true }, (error, addresses: LookupAddress[]) => {
    if (error !== null) return done(error, [])
    const open = addresses.filter(({ address }) => isPublicAddress(address))
    const [first] = open
    if (first === undefined)
      return done(Object.assign(new Error('not a public address'), { code: 'EADDRNOTAVAIL' }), [])
    if (options.all === true) return done(null, open)
    done(null, first.address, first.family)
  })
}

/** For requests to addresses that came from outside. */
export const publicAgent = (): Agent => new Agent({ lookup: publicLookup, keepAlive: true, timeout: 10_000 })
