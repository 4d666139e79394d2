import { useDeferredValue, useMemo, useState } from 'react';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { Day } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { MarkEntry } from '../../ui/mark-entry.tsx';
import { AnswerLines } from '../decode/answer-lines.tsx';
import { CandidateTable } from '../decode/candidate-table.tsx';
import { DIVISIONS_SHOWN, divisionsOf } from '../decode/divisions.ts';
import { faultOfMark } from '../decode/fault-of-mark.ts';
import { ThrownOut } from '../decode/thrown-out.tsx';
import { limitsAround } from './day-strip.ts';
import { decodeUnderDraft } from './draft-decoding.ts';

type Props = { readonly compiled: CompiledCipher; readonly today: Day; /** The day of the strip: near it a cipher without years is read. */ readonly day: Day; readonly stale: boolean };

/** Any mark, read under the draft as it stands, in the page. */
export function DraftDecoder({ compiled, today, day, stale }: Props) {
  const [mark, setMark] = useState('');
  const asked = useDeferredValue(mark);
  const decoded = useMemo(() => {
    const reading = parseReading(asked);
    return reading.ok ? decodeUnderDraft(reading.value, compiled, { asOf: today, ...limitsAround(compiled, day) }) : null;
  }, [asked, compiled, today, day]);
  const isStale = stale || asked !== mark;
  return (
    <>
      <MarkEntry
        label="A mark"
        value={mark}
        onChange={setMark}
        fault={faultOfMark(mark)}
        divisions={isStale || decoded === null ? [] : divisionsOf(decoded.result.candidates).slice(0, DIVISIONS_SHOWN)}
        lit={isStale ? null : (decoded?.result.settle[0]?.position ?? null)}
      />
      {!compiled.calendar.hasYear && <p className="mt-2 text-[15px] text-slag">The draft doesn’t tell the year: marks are read within a year of the day above.</p>}
      {decoded !== null && (
        <>
          <AnswerLines answer={decoded.answer} inHand={decoded.result} stale={isStale} tried="one maker" />
          <CandidateTable result={decoded.result} fit={null} serial="" stale={isStale} />
          <ThrownOut reasons={decoded.result.reasons} />
        </>
      )}
    </>
  );
}
