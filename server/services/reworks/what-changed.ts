import type { DateMark, Fitting, Stretch } from './parts-at-hand.ts';
import type { Decoded, Fitted, WorkedOut } from './work-out-parts.ts';

export type MachineChange = { readonly machineId: string; readonly castings: number; readonly dates: number; readonly fits: number };

/** What came out otherwise than it stands on record, and what was never worked out before. */
export type Changes = {
  /** To be written, because they are new or came out otherwise. */
  readonly castings: readonly { readonly partId: string; readonly castingId: string | null }[];
  readonly decodings: readonly ({ readonly markId: string } & Decoded)[];
  readonly fits: readonly ({ readonly fittingId: string } & Fitted)[];
  /** Marks of which nothing can be said any more. */
  readonly undecoded: readonly string[];
  /** Decodings and fits that came out otherwise; what is new is not counted. */
  readonly changed: number;
  /** The same by the machine the part is on now. */
  readonly machines: readonly MachineChange[];
};

/** Compares what was worked out with the record. What is worked out for the first time is written and changes nothing anybody was told. */
export function whatChanged({ parts, dates, fittings }: Stretch, worked: WorkedOut): Changes {
  const machineOf = new Map(fittings.map(({ partId, machineId }) => [partId, machineId]));
  const machines = new Map<string, MachineChange>();
  const count = (partId: string, what: 'castings' | 'dates' | 'fits'): void => {
    const machineId = machineOf.get(partId);
    if (machineId === undefined) return;
    const before = machines.get(machineId) ?? { machineId, castings: 0, dates: 0, fits: 0 };
    machines.set(machineId, { ...before, [what]: before[what] + 1 });
  };

  const castings = parts.flatMap(({ id, castingId }) => {
    const now = worked.castings.get(id) ?? null;
    if (now === castingId) return [];
    count(id, 'castings');
    return [{ partId: id, castingId: now }];
  });
  let changed = 0;
  const undecoded: string[] = [];
  const decodings = dates.flatMap((mark) => {
    const now = worked.decodings.get(mark.id) ?? null;
    const isNew = mark.status === null;
    if (!isNew && !sameDates(mark, now)) {
      changed += 1;
      count(mark.partId, 'dates');
    }
    if (now === null) {
      if (!isNew) undecoded.push(mark.id);
      return [];
    }
    return isNew || !sameDates(mark, now) || mark.cipherVersion !== now.cipherVersion ? [{ markId: mark.id, ...now }] : [];
  });
  const fits = fittings.flatMap((fitting) => {
    const now = worked.fits.get(fitting.id);
    if (now === undefined) return [];
    const isNew = fitting.workedOut === null;
    if (!isNew && sameFit(fitting, now)) return [];
    if (!isNew) {
      changed += 1;
      count(fitting.partId, 'fits');
    }
    return [{ fittingId: fitting.id, ...now }];
  });
  return { castings, decodings, fits, undecoded, changed, machines: [...machines.values()] };
}

/** A new version of a cipher that says the same of a mark changes nothing. */
function sameDates({ status, cipherId, total, candidates }: DateMark, now: Decoded | null): boolean {
  return (
    now !== null && status === now.status && cipherId === now.cipherId && total === now.total && JSON.stringify(candidates) === JSON.stringify(now.candidates)
  );
}

function sameFit(fitting: Fitting, now: Fitted): boolean {
  return (
    fitting.verdict === now.verdict &&
    fitting.late === now.late &&
    fitting.inLead === now.inLead &&
    fitting.early === now.early &&
    fitting.markId === now.markId &&
    fitting.typeVerdict === now.typeVerdict &&
    fitting.built?.from === now.built?.from &&
    fitting.built?.to === now.built?.to
  );
}
