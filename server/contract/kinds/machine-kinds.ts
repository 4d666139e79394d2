import type { MachineKind } from '#domain/vocabulary.ts';

/** What a machine of each kind is called. */
export const MACHINE_KIND_CHOICES = [
  { value: 'crawler-tractor', label: 'Crawler tractor' },
  { value: 'lathe', label: 'Lathe' },
  { value: 'stationary-engine', label: 'Stationary engine' },
  { value: 'barn-machine', label: 'Barn machine' },
] as const satisfies readonly { readonly value: MachineKind; readonly label: string }[];
