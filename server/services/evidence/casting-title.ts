/** What a casting is called. */
export function castingTitle({ number, pattern }: { readonly number: string; readonly pattern: string | null }): string {
  return pattern === null ? number : `${number} (${pattern})`;
}
