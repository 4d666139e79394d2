import { useDeferredValue, useId, useState } from 'react';
import type { ReactNode } from 'react';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import type { Day } from '#domain/dates/day.ts';
import { dayFrom } from '../../lib/say-date.ts';
import { today as todayIso } from '../../lib/today.ts';
import { CalendarStrip } from './calendar-strip.tsx';
import { firstDay } from './day-strip.ts';
import { DraftDecoder } from './draft-decoder.tsx';
import { RecordTrial } from './record-trial.tsx';

type Props = {
  readonly definition: CipherDefinition;
  readonly compiled: CompiledCipher | null;
  readonly makerId: string | null;
  readonly foundryId: string | null;
  readonly subjectId: string | null;
};

/** The draft tried while it is typed: days written, marks read, the record gone through. What is worked out here waits for the typing. */
export function DraftTrials({ definition, compiled, makerId, foundryId, subjectId }: Props) {
  const [today] = useState(() => dayFrom(todayIso()));
  const [chosen, setChosen] = useState<Day | null>(null);
  const tried = useDeferredValue(compiled);
  const day = chosen ?? (tried === null ? null : firstDay(tried, today));
  const stale = tried !== compiled;
  return (
    <div className="space-y-10">
      <Trial heading="Any day, written">
        {tried === null ? (
          <p className="text-slag">Once the draft makes sense, the mark of any day stands here.</p>
        ) : day === null ? (
          <p className="text-slag">The cipher is not in use yet, so there is no day to write.</p>
        ) : (
          <CalendarStrip compiled={tried} {...{ today, day, stale }} onDay={setChosen} />
        )}
      </Trial>
      <Trial heading="Any mark, read">
        {tried === null || day === null ? (
          <p className="text-slag">Once the draft makes sense, any mark can be read under it here.</p>
        ) : (
          <DraftDecoder compiled={tried} {...{ today, day, stale }} />
        )}
      </Trial>
      <Trial heading="The marks on record">
        <RecordTrial {...{ definition, compiled, makerId, foundryId, subjectId }} />
      </Trial>
    </div>
  );
}

function Trial({ heading, children }: { readonly heading: string; readonly children: ReactNode }) {
  const id = useId();
  return (
    <section aria-labelledby={id}>
      <h3 id={id} className="mb-3 text-[19px] font-semibold">
        {heading}
      </h3>
      {children}
    </section>
  );
}
