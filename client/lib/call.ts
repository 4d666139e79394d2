import type { AnswerOf, CallInput, Endpoint } from '#contract/endpoint.ts';
import { problemFrom, UnreachableError } from './problem-error.ts';

/** How long an answer may take before we say so. */
const PATIENCE_MS = 15_000;

type Optionally<Part> = Record<never, never> extends Part ? Part | undefined : never;

/** Parts an endpoint does not take, or takes nothing required in, may be left out. */
export type CallOptions<E extends Endpoint> = {
  readonly [Part in keyof CallInput<E> as Record<never, never> extends CallInput<E>[Part] ? never : Part]: CallInput<E>[Part];
} & {
  readonly [Part in keyof CallInput<E> as Record<never, never> extends CallInput<E>[Part] ? Part : never]?: Optionally<CallInput<E>[Part]>;
} & {
  readonly signal?: AbortSignal;
  /** Under which a creating request is done once, however often it is sent; a UUID. */
  readonly key?: string;
};

/**
 * Calls an endpoint and parses what comes back.
 * Throws `ProblemError` when the register answers with a problem and `UnreachableError` when no answer comes;
 * a call that was given up through `signal` rejects with the signal's own reason.
 */
export async function call<E extends Endpoint>(endpoint: E, options: CallOptions<E>): Promise<AnswerOf<E>>;
export async function call(endpoint: Endpoint, options: LooseOptions): Promise<unknown> {
  const response = await send(endpoint, options);
  if (!response.ok) throw await problemFrom(response);
  return endpoint.answer.parse(await response.json());
}

type LooseOptions = Partial<CallInput<Endpoint>> & { readonly signal?: AbortSignal; readonly key?: string };

async function send(endpoint: Endpoint, options: LooseOptions): Promise<Response> {
  const timeout = AbortSignal.timeout(PATIENCE_MS);
  const hasBody = options.body !== undefined;
  try {
    return await fetch(addressOf(endpoint.path, options.params, options.query), {
      method: endpoint.method,
      headers: { Accept: 'application/json', ...(hasBody ? { 'Content-Type': 'application/json' } : {}), ...(options.key === undefined ? {} : { 'Idempotency-Key': options.key }) },
      ...(hasBody ? { body: JSON.stringify(options.body) } : {}),
      credentials: 'same-origin',
      signal: options.signal === undefined ? timeout : AbortSignal.any([options.signal, timeout]),
    });
  } catch (error) {
    options.signal?.throwIfAborted();
    throw new UnreachableError(timeout.aborted ? 'timeout' : navigator.onLine ? 'no-answer' : 'offline', error);
  }
}

/** `/castings/:slug` with its parameters and query filled in, below `/api`. Undefined query values are left out. */
export function addressOf(path: string, params: unknown, query: unknown): string {
  const values = fieldsOf(params);
  const filled = path.replace(/:(\w+)/g, (_, name: string) => {
    const value = values[name];
    if (value === undefined) throw new TypeError(`No value for :${name} in ${path}`);
    return encodeURIComponent(value);
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(fieldsOf(query))) search.set(name, value);
  return `/api${filled}${search.size > 0 ? `?${search.toString()}` : ''}`;
}

/** What an address can carry of a params or query object: text, numbers and yes or no; the rest is left out. */
function fieldsOf(part: unknown): Readonly<Record<string, string>> {
  const carried: Record<string, string> = {};
  for (const [name, value] of Object.entries(typeof part === 'object' && part !== null ? part : {}) as [string, unknown][]) {
    if (typeof value === 'string') carried[name] = value;
    else if (typeof value === 'number' || typeof value === 'boolean') carried[name] = String(value);
  }
  return carried;
}
