import type { BuildAnswer } from '#contract/models.ts';
import { saySpan } from '../../lib/say-date.ts';
import { sayList } from '../../lib/say-number.ts';

type Neighbour = BuildAnswer['neighbours'][number];

/** What the serial ranges say where no range holds the number; null where one does. */
export function sayStanding(build: BuildAnswer): string | null {
  const number = build.serial.asStamped;
  switch (build.standing) {
    case 'in-range':
      return build.window === null ? `A range holds ${number}, but its dates are not those of building.` : null;
    case 'before-first':
      return `${number} comes before the first number on record. ${sayNeighbours(build.neighbours)}`;
    case 'after-last':
      return `${number} comes after the last number on record. ${sayNeighbours(build.neighbours)}`;
    case 'gap':
      return `${number} stands in a gap between the ranges on record. ${sayNeighbours(build.neighbours)}`;
    case 'unknown-prefix':
      return build.serial.prefix === ''
        ? `No series of this model is numbered without a prefix. Look at the plate again.`
        : `No series of this model has the prefix ${build.serial.prefix}. Look at the plate again, or choose another model.`;
  }
}

/** Glyphs taken for others to make the number readable, said so that it can be checked; null where none were. */
export function saySubstitutions({ serial }: BuildAnswer): string | null {
  if (serial.substitutions.length === 0) return null;
  const taken = serial.substitutions.map(({ seen, taken: as }) => `${seen} as ${as}`);
  return `Read ${sayList([...new Set(taken)], 'and')}.`;
}

/** A range by its numbers: `1001–1390`, `from 2000`. */
export function sayNumbers({ first, last }: Pick<Neighbour, 'first' | 'last'>, prefix = ''): string {
  const lead = prefix === '' ? '' : `${prefix} `;
  return last === null ? `from ${lead}${first}` : `${lead}${first}–${last}`;
}

function sayNeighbours(neighbours: readonly Neighbour[]): string {
  if (neighbours.length === 0) return '';
  const said = neighbours.map((range) => `${sayNumbers(range)} ${MEANINGS[range.meaning]} ${saySpan(range.dates)}`);
  return `${neighbours.length === 1 ? 'Nearest' : 'On either side'}: ${sayList(said, 'and')}.`;
}

const MEANINGS: Readonly<Record<Neighbour['meaning'], string>> = {
  built: 'built',
  dispatched: 'dispatched',
  sold: 'sold',
  'model-year': 'of model year',
};
