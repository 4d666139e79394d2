/** Where to go on after signing in: an address of this site and no other, whatever the link said. */
export function safeNext(wanted: string | null, otherwise: string): string {
  if (wanted === null || !wanted.startsWith('/')) return otherwise;
  const base = 'https://site.invalid';
  if (!URL.canParse(wanted, base)) return otherwise;
  const { origin, pathname, search, hash } = new URL(wanted, base);
  return origin === base && pathname !== '/sign-in' ? `${pathname}${search}${hash}` : otherwise;
}
