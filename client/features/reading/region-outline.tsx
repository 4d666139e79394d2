import type { Region } from '#contract/parts.ts';
import { cornersOf, toStage } from './stage-geometry.ts';
import type { Lie, Size } from './stage-geometry.ts';

/** Where the mark stands, outlined on the stage; dashed while it is being drawn. */
export function RegionOutline({ region, view, picture, stage, drawing }: { readonly region: Region; readonly view: Lie; readonly picture: Size; readonly stage: Size; readonly drawing: boolean }) {
  const points = cornersOf(region)
    .map((corner) => toStage(view, picture, stage, corner))
    .map(({ x, y }) => `${x.toFixed(1)},${y.toFixed(1)}`)
    .join(' ');
  return (
    <svg className="pointer-events-none absolute inset-0 size-full" aria-hidden="true" focusable="false">
      <polygon points={points} className="fill-none stroke-relief-shade" strokeWidth="4" opacity="0.6" />
      <polygon points={points} className={`fill-none ${drawing ? 'stroke-lamp' : 'stroke-relief-lit'}`} strokeWidth="2" {...(drawing ? { strokeDasharray: '8 5' } : {})} />
    </svg>
  );
}
