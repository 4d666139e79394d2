import { randomUUID } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { pino } from 'pino';
import type { DestinationStream, Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import type { HttpLogger } from 'pino-http';
import { ProblemError } from '#server/services/problem-error.ts';

/** Ids we take from a proxy: long enough to be one, short and plain enough to be written into a log and a header. */
const SANE_REQUEST_ID = /^[A-Za-z0-9_-]{8,64}$/;

/** A logger of JSON lines with times in UTC. */
export function createLogger(level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
    serializers: { err: describeError },
  };
  return destination ? pino(options, destination) : pino(options);
}

/**
 * One line a request: id, method, path, status, time taken. Never the query or the body: what people type there (serials, marks) is
 * theirs. The id is answered in `X-Request-Id`.
 */
export function logRequests(logger: Logger): HttpLogger {
  return pinoHttp({
    logger,
    genReqId: requestId,
    wrapSerializers: false,
    serializers: {
      req: (request: { id: unknown; method: string; url: string }) => ({
        id: request.id,
        method: request.method,
        path: withoutSecrets(request.url),
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      err: describeError,
    },
    customLogLevel: (request, response) => {
      if (response.statusCode >= 500) return 'error';
      return request.url === '/healthz' || request.url === '/readyz' ? 'debug' : 'info';
    },
    customSuccessMessage: () => 'answered',
    customErrorMessage: () => 'failed',
    // What went wrong has a line of its own, with its cause.
    customErrorObject: (_request, _response, _error, { res, responseTime }: { res: unknown; responseTime: unknown }) => ({ res, responseTime }),
  });
}

/** The path of an address, without the one secret that stands in a path. */
function withoutSecrets(url: string): string {
  const [path = ''] = url.split('?', 1);
  return path.replace(/(\/unsubscribe\/)[^/]+/, '$1…');
}

/** The id pino-http gave a request, as text. */
export function requestIdOf(request: IncomingMessage): string {
  return typeof request.id === 'string' ? request.id : '';
}

function requestId(request: IncomingMessage, response: ServerResponse): string {
  const offered = request.headers['x-request-id'];
  const id = typeof offered === 'string' && SANE_REQUEST_ID.test(offered) ? offered : randomUUID();
  response.setHeader('X-Request-Id', id);
  return id;
}

/**
 * An error as the log keeps it. A database driver puts the statement and the values people typed into its message and its detail, so of
 * errors that are not ours only the kind, the code and where it happened are kept.
 */
function describeError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { type: typeof error };
  if (error instanceof ProblemError) {
    return { type: error.name, kind: error.kind, internal: error.internal, ...(error.cause === undefined ? {} : { cause: describeError(error.cause) }) };
  }
  const native = 'nativeError' in error && error.nativeError instanceof Error ? error.nativeError : error;
  const known = (['code', 'syscall', 'severity', 'schema', 'table', 'column', 'constraint', 'routine'] as const).flatMap((name) =>
    name in native ? [[name, Reflect.get(native, name)] as const] : [],
  );
  const fromDatabase = 'severity' in native || 'sql' in native;
  return {
    type: error.name,
    ...(fromDatabase ? {} : { message: error.message }),
    ...Object.fromEntries(known),
    stack: framesOf(error),
  };
}

/** The frames of a stack without the message above them. */
function framesOf(error: Error): string[] {
  return (error.stack ?? '')
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line.startsWith('at '));
}
