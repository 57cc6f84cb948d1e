import ipaddr from 'ipaddr.js'

/*
 * Only what is written as networks are written: of the older forms of an IPv4 address, octal ones above all, readers
 * disagree on which address is meant.
 */
const v4 = /^(?!.*(^|\.)0\d)\d{1,3}(\.\d{1,3}){3}(\/\d{1,2})?$/
const v6 = /^(?=.*:)[0-9a-f:.]{2,45}(\/\d{1,3})?$/i

/** A network in its usual form, or undefined: `203.0.113.7` is itself, `203.0.113.7/24` is `203.0.113.0/24`. */
export function networkOf(text: string): string | undefined {
  if (!v4.test(text) && !v6.test(text)) return undefined
  const cidr = withLength(text)
  if (!ipaddr.isValidCIDR(cidr)) return undefined
  const [address, length] = ipaddr.parseCIDR(cidr)
  if (isMapped(address)) return undefined
  const kind = address.kind() === 'ipv4' ? ipaddr.IPv4 : ipaddr.IPv6
  const first = kind.networkAddressFromCIDR(cidr).toString()
  return length === address.toByteArray().length * 8 ? first : `${first}/${length}`
}

/** True where the address is in one of the networks. An IPv4 address counts as such also where IPv6 wraps it. */
export function isWithin(address: string, networks: readonly string[]): boolean {
  if (!ipaddr.isValid(address)) return false
  const at = ipaddr.process(address)
  return networks.some((text) => {
    const [network, length] = ipaddr.parseCIDR(withLength(text))
    return network.kind() === at.kind() && at.match([network, length])
  })
}

const withLength = (text: string) => (text.includes('/') ? text : `${text}/${text.includes(':') ? 128 : 32}`)

const isMapped = (address: ipaddr.IPv4 | ipaddr.IPv6) => address instanceof ipaddr.IPv6 && address.isIPv4MappedAddress()
