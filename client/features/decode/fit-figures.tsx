import type { FitAnswer } from '#contract/fit.ts';
import { TEXT_TONES, Verdict, VERDICTS } from '../../ui/verdict.tsx';
import { sayShare, sayShareAloud } from './say-share.ts';

const FIGURES = [
  { key: 'early', verdict: 'older-stock' },
  { key: 'in', verdict: 'in-step' },
  { key: 'late', verdict: 'cast-after-build' },
] as const;

/** The three figures, ruled: how likely the part was poured too early, in time, too late. Early is never said where no lead is on record. */
export function FitFigures({ fit }: { readonly fit: FitAnswer }) {
  return (
    <dl className="mt-4 max-w-[560px]">
      {FIGURES.map(({ key, verdict }) => (
        <div key={key} className="grid grid-cols-[1fr_auto] items-center gap-x-4 border-b border-rule py-2 roomy:grid-cols-[168px_1fr_80px]">
          <dt>
            <Verdict kind={verdict} />
          </dt>
          <dd aria-hidden="true" className={`col-span-2 row-start-2 m-0 roomy:col-span-1 roomy:row-start-auto ${TEXT_TONES[VERDICTS[verdict].tone]}`}>
            <svg width="100%" height="10" className="block">
              <rect width={`${fit[key] * 100}%`} height="10" fill="currentColor" />
              <rect x="0.5" y="0.5" width="99.6%" height="9" className="fill-none stroke-graphite" />
            </svg>
          </dd>
          <dd className="m-0 text-right tabular-nums">
            {key === 'early' && !fit.leadOnRecord ? (
              <span className="text-slag">not said</span>
            ) : (
              <>
                <span aria-hidden="true">{sayShare(fit[key])}</span>
                <span className="sr-only">{sayShareAloud(fit[key])}</span>
              </>
            )}
          </dd>
        </div>
      ))}
    </dl>
  );
}
