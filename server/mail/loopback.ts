const LOOPBACK_NAMES = new Set(['localhost', '127.0.0.1', '[::1]']);

/** Whether a host name, as `URL` writes it, can only be this machine. */
export function isLoopback(hostname: string): boolean {
  return LOOPBACK_NAMES.has(hostname);
}
