import { LIMITS } from '#contract/limits.ts';

/** Everything a reader has said on the decode page. It lives in the address and nowhere else. */
export type DecodeState = {
  /** As typed, in the mark notation; empty before anything is. */
  readonly mark: string;
  /** Slugs; null where nothing is chosen. */
  readonly maker: string | null;
  readonly cipher: string | null;
  readonly model: string | null;
  readonly position: string | null;
  readonly casting: string | null;
  /** As stamped; empty where none is given. */
  readonly serial: string;
  readonly lookAlikes: boolean;
  /** Years as typed: the casting is from no earlier and no later; empty for no limit. */
  readonly fromYear: string;
  readonly toYear: string;
};

export const NOTHING_SAID: DecodeState = {
  mark: '',
  maker: null,
  cipher: null,
  model: null,
  position: null,
  casting: null,
  serial: '',
  lookAlikes: false,
  fromYear: '',
  toYear: '',
};

const SLUG = /^[a-z0-9]+(?:-[a-z0-9]+)*$/;

/** Reads an address. Whatever is not understood is left out; nothing is refused. */
export function readDecodeState(search: URLSearchParams): DecodeState {
  const text = (name: string, longest: number) => (search.get(name) ?? '').slice(0, longest);
  const slug = (name: string) => {
    const value = text(name, LIMITS.slug);
    return SLUG.test(value) ? value : null;
  };
  return {
    mark: text('mark', LIMITS.mark),
    maker: slug('maker'),
    cipher: slug('cipher'),
    model: slug('model'),
    position: slug('position'),
    casting: slug('casting'),
    serial: text('serial', LIMITS.serial),
    lookAlikes: search.get('lookAlikes') === 'yes',
    fromYear: text('from', 4),
    toYear: text('to', 4),
  };
}

/** Writes the address; what has not been said is left out. `readDecodeState` undoes it. */
export function writeDecodeState(state: DecodeState): URLSearchParams {
  const search = new URLSearchParams();
  const put = (name: string, value: string | null) => {
    if (value !== null && value !== '') search.set(name, value);
  };
  put('mark', state.mark);
  put('maker', state.maker);
  put('cipher', state.cipher);
  put('lookAlikes', state.lookAlikes ? 'yes' : null);
  put('from', state.fromYear);
  put('to', state.toYear);
  put('casting', state.casting);
  put('model', state.model);
  put('serial', state.serial);
  put('position', state.position);
  return search;
}

/** A choice that hangs on another goes when the other changes: the cipher with its maker, the position with its model. */
export function changeDecodeState(state: DecodeState, change: Partial<DecodeState>): DecodeState {
  const next = { ...state, ...change };
  return {
    ...next,
    cipher: next.maker !== state.maker && change.cipher === undefined ? null : next.cipher,
    position: next.model !== state.model && change.position === undefined ? null : next.position,
  };
}

/** What is wrong with a year as typed, or null. */
export function yearFault(year: string): string | null {
  return year === '' || /^\d{4}$/.test(year) ? null : 'A year has four figures';
}

/** What is wrong with the two years together, beside the second. */
export function yearsFault({ fromYear, toYear }: DecodeState): string | null {
  if (yearFault(toYear) !== null) return yearFault(toYear);
  if (fromYear === '' || toYear === '' || yearFault(fromYear) !== null) return null;
  return toYear < fromYear ? 'The last year is before the first' : null;
}

/** The limits as the decoder takes them; undefined where there are none, or while they are being typed. */
export function limitsOf(state: DecodeState): { readonly from?: string; readonly to?: string } | undefined {
  if (yearFault(state.fromYear) !== null || yearsFault(state) !== null) return undefined;
  const from = state.fromYear === '' ? {} : { from: `${state.fromYear}-01-01` };
  const to = state.toYear === '' ? {} : { to: `${state.toYear}-12-31` };
  return state.fromYear === '' && state.toYear === '' ? undefined : { ...from, ...to };
}
