import { isIP } from 'node:net';
import { describe, expect, test } from 'vitest';
import { networkOf } from '#server/http/auth/network.ts';

// Addresses for documentation: RFC 5737 and RFC 3849; text forms: RFC 4291, 2.2.
describe('the network an address is counted under', () => {
  test.each([
    ['192.0.2.17', '192.0.2.17/32'],
    ['::ffff:192.0.2.17', '192.0.2.17/32'],
    ['::FFFF:192.0.2.17', '192.0.2.17/32'],
    ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2::/64'],
    ['2001:db8:1:2::9', '2001:db8:1:2::/64'],
    ['2001:db8::9', '2001:db8:0:0::/64'],
    ['::1', '0:0:0:0::/64'],
    ['fe80::1%eth0', 'fe80:0:0:0::/64'],
    ['2001:db8:1:2::', '2001:db8:1:2::/64'],
  ])('of %s is %s', (address, network) => {
    expect(isIP(network.split('/')[0] ?? '')).toBeGreaterThan(0);
    expect(networkOf(address)).toBe(network);
  });

  test.each([undefined, '', 'unknown', '192.0.2.300', '1:2:3'])('of what is no address (%s) is one for all of them', (address) => {
    expect(networkOf(address)).toBe('0.0.0.0/32');
  });
});
