import type { z } from 'zod';
import type { MarkPage } from '#contract/marks.ts';
import type { FactName } from '#db/models/fact-name.ts';
import type { MarkOnRecord } from '#server/services/marks/read-mark.ts';
import { shownSerial } from '#server/services/marks/shown-serial.ts';
import { presentNamed } from './common.ts';
import { loaded } from './loaded.ts';

type Page = z.input<typeof MarkPage>;

export function presentMark({ mark, maker, casting, machine, cipher, isWorkedOut }: MarkOnRecord): Page {
  return {
    id: mark.id,
    kind: mark.kind,
    technique: mark.technique,
    reading: mark.reading,
    readings: loaded(mark.readings).map(({ text, reader, madeAt }) => ({ text, by: loaded(reader).displayName, at: madeAt })),
    maker: maker && presentNamed(maker),
    casting: casting && presentFact(casting),
    machine: machine && { model: presentNamed(loaded(machine.model)), serial: shownSerial(machine) },
    dates: isWorkedOut ? presentDates(mark.decoding ?? null, cipher) : null,
    workingOut: !isWorkedOut,
  };
}

function presentDates(decoding: MarkOnRecord['mark']['decoding'] | null, cipher: FactName | null): Page['dates'] {
  if (!decoding) return null;
  const { status, cipherVersion, candidates, total } = decoding;
  return { status, cipher: cipher && presentFact(cipher), cipherVersion, candidates: candidates.map(({ from, to, share }) => ({ from, to, share })), total };
}

function presentFact({ id, kind, slug, title }: FactName): NonNullable<Page['casting']> {
  return { id, kind, slug, title };
}
