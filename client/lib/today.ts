/** Today's calendar day as ISO text, by the clock of the whole world rather than of this place, so that everyone has the same. */
export function today(): string {
  return new Date().toISOString().slice(0, 10);
}
