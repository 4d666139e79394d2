import type { Rework } from '#contract/moderation.ts';
import { sayFigure } from '../../lib/say-number.ts';

/** How far it has come: `waiting`, `120 of 4,300 looked at`, `4,300 looked at`. */
export function sayProgress({ state, done, total }: Pick<Rework, 'state' | 'done' | 'total'>): string {
  if (state === 'waiting') return 'waiting for its turn';
  if (state === 'done') return `${sayFigure(done)} looked at`;
  return total === null ? `${sayFigure(done)} looked at so far` : `${sayFigure(done)} of ${sayFigure(total)} looked at`;
}

/** What came out otherwise, of decodings and fits, and on how many machines. */
export function sayOutcome({ changed, machinesChanged }: Pick<Rework, 'changed' | 'machinesChanged'>): string {
  if (changed === 0) return 'nothing came out otherwise';
  const machines = machinesChanged === 0 ? '' : `, on ${sayFigure(machinesChanged)} ${machinesChanged === 1 ? 'machine' : 'machines'}`;
  return `${sayFigure(changed)} came out otherwise${machines}`;
}

export const STATE_WORDS: Readonly<Record<Rework['state'], string>> = {
  waiting: 'waits',
  running: 'runs',
  done: 'done',
  failed: 'stopped',
};
