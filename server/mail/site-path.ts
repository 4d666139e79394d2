import { z } from 'zod';

/**
 * An address of this site, from its first slash on. One slash and no backslash, space or control character anywhere: with those a browser
 * can be led to another host.
 */
export const SitePath = z
  .string()
  .max(500)
  .regex(/^\/(?:[^/\s\\\p{Cc}][^\s\\\p{Cc}]*)?$/u, 'Not an address of this site');
