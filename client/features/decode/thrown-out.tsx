import type { DecodeResult } from '#contract/decode.ts';
import { capital } from '../../lib/say-number.ts';

const SHOWN = 2;

/** Why other ways to split the mark came to nothing, the nearest first. */
export function ThrownOut({ reasons }: Pick<DecodeResult, 'reasons'>) {
  if (reasons.length === 0) return null;
  const told = reasons.slice(0, SHOWN);
  const more = reasons.slice(SHOWN);
  return (
    <div className="mt-4 text-[15px] leading-snug text-slag">
      <p className="font-semibold">Thrown out</p>
      <Reasons reasons={told} />
      {more.length > 0 && (
        <details>
          <summary className="inline-flex min-h-11 cursor-pointer items-center text-temper underline underline-offset-4">{more.length} more</summary>
          <Reasons reasons={more} />
        </details>
      )}
    </div>
  );
}

function Reasons({ reasons }: Pick<DecodeResult, 'reasons'>) {
  return (
    <ul>
      {reasons.map(({ code, message }) => (
        <li key={`${code} ${message}`}>{capital(message)}</li>
      ))}
    </ul>
  );
}
