import { isIPv4, isIPv6 } from 'node:net';

const MAPPED = /^::ffff:(?=[\d.]+$)/i;
/** A household or a server has this much of IPv6 to itself. */
const HOUSEHOLD = 64;
const GROUPS = 8;
const GROUP_BITS = 16;

/** Where a request came from, for counting: one address of IPv4, the /64 of IPv6, in CIDR notation. */
export function networkOf(address: string | undefined): string {
  const plain = (address ?? '').replace(MAPPED, '').replace(/%.*$/, '');
  if (isIPv4(plain)) return `${plain}/32`;
  if (!isIPv6(plain)) return '0.0.0.0/32';
  return `${groupsOf(plain).slice(0, HOUSEHOLD / GROUP_BITS).join(':')}::/${HOUSEHOLD}`;
}

function groupsOf(address: string): string[] {
  const [head = '', tail] = address.split('::');
  const before = head === '' ? [] : head.split(':');
  if (tail === undefined) return before;
  const after = tail === '' ? [] : tail.split(':');
  return [...before, ...Array.from({ length: GROUPS - before.length - after.length }, () => '0'), ...after];
}
