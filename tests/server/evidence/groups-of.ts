import type { EvidenceGroup, Findings } from '#contract/evidence.ts';

type Told = readonly [count: number, of: number | null, unlisted: number, lines: readonly (string | null)[]];

/** Findings as a test writes them down: group by group the count, out of how many, how many are not listed, and each line’s text. */
export function told({ groups }: Findings): Readonly<Record<string, Told>> {
  return Object.fromEntries(groups.map(({ code, count, of, unlisted, items }) => [code, [count, of, unlisted, items.map(({ text }) => text)]]));
}

export function groupCalled(findings: Findings, code: string): EvidenceGroup {
  const group = findings.groups.find((one) => one.code === code);
  if (group === undefined) throw new Error(`no group ${code}`);
  return group;
}
