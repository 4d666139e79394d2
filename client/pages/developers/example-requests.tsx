import { useMutation, useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import { decodeMark } from '#contract/decode.ts';
import type { DecodeRequest } from '#contract/decode.ts';
import { judgeFitOfPart } from '#contract/fit.ts';
import type { FitRequest } from '#contract/fit.ts';
import { readBuild } from '#contract/models.ts';
import { serialRangesList } from '../../features/serial-ranges/serial-ranges-queries.ts';
import { addressOf, call } from '../../lib/call.ts';
import { Button } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';

const DECODE: z.input<typeof DecodeRequest> = {
  mark: 'B?[OD]CB',
  cipher: {
    fields: [
      { field: 'month', symbols: 'key', width: [1, 2] },
      { field: 'day', symbols: 'key', width: [1, 2] },
      { field: 'year', symbols: 'key', width: 2 },
    ],
    symbolSets: {
      key: { kind: 'digits', symbols: { B: '1', L: '2', O: '3', C: '4', K: '5', P: '6', R: '7', I: '8', N: '9', T: '0' } },
    },
    usedFrom: '1928-01-01',
    usedTo: '1954-12-31',
  },
  limits: { from: '1934-01-01', to: '1949-12-31' },
};

const FIT: z.input<typeof FitRequest> = {
  candidates: [
    { from: '1941-01-13', to: '1941-01-13', share: 0.5 },
    { from: '1941-11-03', to: '1941-11-03', share: 0.5 },
  ],
  build: { from: '1941-02-10', to: '1941-03-10' },
  lead: { least: 0, most: 365 },
};

/** Three questions as they are sent; each can be sent from here, and what comes back is what the register answers now. */
export function ExampleRequests() {
  const [range] = useQuery(serialRangesList({ limit: 1 })).data?.items ?? [];
  return (
    <div className="space-y-8">
      <Example
        heading="Every date a mark can mean"
        request={`POST ${addressOf(decodeMark.path, {}, {})}`}
        body={DECODE}
        send={() => call(decodeMark, { body: DECODE })}
      />
      {range !== undefined && (
        <Example
          heading="When a serial was built"
          request={`GET ${addressOf(readBuild.path, { slug: range.model.slug }, { serial: range.series.prefix + range.first })}`}
          send={() =>
            call(readBuild, { params: { slug: range.model.slug }, query: { serial: range.series.prefix + range.first } })
          }
        />
      )}
      <Example
        heading="Whether the one fits the other"
        request={`POST ${addressOf(judgeFitOfPart.path, {}, {})}`}
        body={FIT}
        send={() => call(judgeFitOfPart, { body: FIT })}
      />
    </div>
  );
}

type ExampleProps = {
  readonly heading: string;
  readonly request: string;
  readonly body?: unknown;
  readonly send: () => Promise<unknown>;
};

function Example({ heading, request, body, send }: ExampleProps) {
  const { data, error, isPending, isIdle, mutate } = useMutation({ mutationFn: send });
  return (
    <section aria-label={heading}>
      <h3 className="mb-2 font-semibold">{heading}</h3>
      <Code label={`Request: ${heading}`}>
        {body === undefined ? request : `${request}\nContent-Type: application/json\n\n${writeJson(body)}`}
      </Code>
      <Button className="mt-3" onClick={() => mutate()} aria-disabled={isPending && !isIdle}>
        Send it
      </Button>
      <div aria-live="polite" className="mt-3">
        {error !== null && <FailureNote error={error} onAgain={() => mutate()} />}
        {data !== undefined && (
          <>
            <p className="mb-1 text-slag">What came back:</p>
            <Code label={`Answer: ${heading}`}>{writeJson(data)}</Code>
          </>
        )}
      </div>
    </section>
  );
}

/** Text as it travels; scrolls inside its own frame, by keyboard too. */
function Code({ label, children }: { readonly label: string; readonly children: string }) {
  return (
    <pre
      role="region"
      aria-label={label}
      tabIndex={0}
      className="max-h-96 overflow-auto border border-rule bg-paper p-3 font-mono text-[14px] leading-relaxed"
    >
      {children}
    </pre>
  );
}

/** JSON to be read: lists of plain values and small objects stay on one line. */
export function writeJson(value: unknown): string {
  return JSON.stringify(value, null, 2).replaceAll(/[[{]\n[^[\]{}]{0,90}[\]}]/g, (short) => short.replaceAll(/\n\s*/g, ' '));
}
