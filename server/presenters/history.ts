import { HistoryEntry } from '#contract/common.ts';
import type { History } from '#contract/common.ts';
import type { CipherVersion } from '#db/models/cipher-version.ts';
import type { FactVersion } from '#db/models/fact-version.ts';
import type { Source } from '#db/models/source.ts';
import { loaded } from './loaded.ts';
import { presentSourceDetails } from './source.ts';

export function presentHistory(versions: readonly FactVersion[]): History {
  return { items: versions.map((version) => presentVersion(version, version.payload)) };
}

export function presentCipherHistory(versions: readonly CipherVersion[]): History {
  return { items: versions.map((version) => presentVersion(version, version.definition)) };
}

export function presentSourceHistory(source: Source): History {
  return {
    items: [
      {
        version: 1,
        enteredBy: loaded(source.enteredBy).displayName,
        enteredAt: source.enteredAt,
        reason: 'First entered',
        inForce: true,
        payload: {
          kind: source.kind,
          title: source.title,
          ...Object.fromEntries(presentSourceDetails(source).map(({ name, value }) => [name, value])),
          note: source.note,
        },
      },
    ],
  };
}

function presentVersion(version: FactVersion | CipherVersion, payload: unknown): HistoryEntry {
  return {
    version: version.number,
    enteredBy: loaded(version.enteredBy).displayName,
    enteredAt: version.enteredAt,
    reason: version.reason,
    inForce: version.supersededAt === null,
    payload: HistoryEntry.shape.payload.parse(payload),
  };
}
