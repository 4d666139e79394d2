import type { ReactNode } from 'react';
import type { DaySpan } from '#domain/dates/day.ts';
import { useWidth } from '../lib/use-width.ts';
import { DataTable } from './data-table.tsx';
import { clipBand, laneRows } from './time-rule-lanes.ts';
import type { Lane, LaneRow, Tick } from './time-rule-lanes.ts';
import { axisLabels, labelWidth, placeLabels } from './time-rule-labels.ts';
import { ruleScale } from './time-rule-scale.ts';
import type { RuleScale } from './time-rule-scale.ts';
import type { Tone } from './verdict.tsx';

/** Lengths of the drawing, in pixels. */
const ROW = 36;
const NAME_ROW = 20;
const LABEL_ROW = 18;
const LABEL_ROWS = 3;
const SCALE = 44;
const NAMES = 152;
const NARROW = 560;
const BAR = 18;
const TICK = { least: 8, most: 22, width: 3 } as const;
const USUAL_WIDTH = 760;

const FILLS: Readonly<Record<Tone, string>> = {
  verdigris: 'fill-verdigris',
  straw: 'fill-straw',
  temper: 'fill-temper',
  scale: 'fill-scale',
  slag: 'fill-slag',
};

type Props = {
  /** What the rule shows, said as a sentence for those who can't see it. */
  readonly title: string;
  readonly lanes: readonly Lane[];
  /** The spans the rule zooms to; lanes that run past them are cut off with an arrow. */
  readonly focus: readonly DaySpan[];
};

/** One horizontal time ruler with a lane for each thing it is asked about, and the same as a table. */
export function TimeRule({ title, lanes, focus }: Props) {
  const [holder, width] = useWidth<HTMLDivElement>(USUAL_WIDTH);
  const narrow = width < NARROW;
  const left = narrow ? 1 : NAMES;
  const length = Math.max(width - left - (narrow ? 1 : 16), 120);
  const scale = ruleScale(focus, length);
  const laid = scale === null ? [] : layLanes(lanes, scale, length, narrow);
  const height = laid.reduce((sum, lane) => sum + lane.height, 0);
  return (
    <figure className="m-0">
      <div ref={holder}>
        {scale !== null && (
          <svg width={width} height={height + SCALE} viewBox={`0 0 ${width} ${height + SCALE}`} role="img" aria-label={title} className="block max-w-full overflow-visible">
            <Guides lanes={lanes} scale={scale} left={left} height={height} />
            {laid.map((lane) => (
              <g key={lane.lane.name} transform={`translate(0 ${lane.top})`}>
                <text x="0" y={narrow ? 14 : lane.base - 7} className="fill-slag text-[15px] italic">
                  {lane.lane.name}
                </text>
                <line x1={left} x2={left + length} y1={lane.height - 0.5} y2={lane.height - 0.5} className="stroke-rule" />
                <g transform={`translate(${left} 0)`}>
                  <LaneDrawing laid={lane} scale={scale} length={length} />
                </g>
              </g>
            ))}
            <Scale scale={scale} left={left} top={height} length={length} />
          </svg>
        )}
      </div>
      <RuleTable rows={laneRows(lanes)} title={title} />
    </figure>
  );
}

type LaidLane = { readonly lane: Lane; readonly top: number; readonly height: number; /** Where its ticks stand. */ readonly base: number; readonly labels: ReturnType<typeof placeLabels> };

function layLanes(lanes: readonly Lane[], scale: RuleScale, length: number, narrow: boolean): LaidLane[] {
  const guides = lanes.flatMap((lane) => (lane.kind === 'window' ? [{ from: scale.x(lane.span.from), to: scale.x(lane.span.to + 1) }] : []));
  let top = 0;
  return lanes.map((lane) => {
    const labels = lane.kind === 'ticks' ? placeLabels(lane.ticks.map((tick) => wishOf(tick, scale)), length, LABEL_ROWS, guides) : [];
    const rows = Math.max(0, ...labels.map(({ row }) => row));
    const head = (narrow ? NAME_ROW : 0) + rows * LABEL_ROW;
    const height = head + ROW;
    const laid = { lane, top, height, base: height - 6, labels };
    top += height;
    return laid;
  });
}

function wishOf(tick: Tick, scale: RuleScale) {
  const { left, right } = edgesOf(tick, scale);
  return { key: tick.key, left, right, text: tick.label, weight: tick.share };
}

function edgesOf(tick: DaySpan, scale: RuleScale): { readonly left: number; readonly right: number } {
  const left = scale.x(tick.from);
  const right = scale.x(tick.to + 1);
  const spare = Math.max(0, (9 - (right - left)) / 2);
  return { left: left - spare, right: right + spare };
}

function LaneDrawing({ laid, scale, length }: { readonly laid: LaidLane; readonly scale: RuleScale; readonly length: number }): ReactNode {
  const { lane, base, labels } = laid;
  switch (lane.kind) {
    case 'band':
      return lane.bands.map((band, place) => <BandDrawing key={place} band={band} look={lane.look} base={base} scale={scale} length={length} />);
    case 'ticks':
      return (
        <>
          {lane.ticks.map((tick) => (
            <TickDrawing key={tick.key} tick={tick} most={Math.max(...lane.ticks.map(({ share }) => share))} base={base} scale={scale} />
          ))}
          {labels.map(({ key, text, x, anchor, row }) => {
            const tone = lane.ticks.find((tick) => tick.key === key)?.tone ?? null;
            return (
              <text key={key} x={x} y={base - 8 - row * LABEL_ROW} textAnchor={anchor} className={`text-[14px] font-semibold ${tone === null ? 'fill-graphite' : FILLS[tone]}`}>
                {text}
              </text>
            );
          })}
        </>
      );
    case 'window':
      return <WindowDrawing lane={lane} base={base} scale={scale} length={length} />;
  }
}

function BandDrawing({ band, look, base, scale, length }: { readonly band: { readonly from: number | null; readonly to: number | null; readonly label?: string }; readonly look: 'outline' | 'filled' | 'hatched'; readonly base: number; readonly scale: RuleScale; readonly length: number }) {
  const held = clipBand(band, scale);
  const middle = base - 10;
  if (held === null) {
    const before = band.to !== null && band.to < scale.from;
    return (
      <text x={before ? 0 : length} y={middle + 5} textAnchor={before ? 'start' : 'end'} className="fill-slag text-[14px]">
        {before ? `← ${band.label ?? 'earlier'}` : `${band.label ?? 'later'} →`}
      </text>
    );
  }
  const left = scale.x(held.from);
  const right = scale.x(held.to + 1);
  const tip = 7;
  const path = [
    `M${held.runsOff.left ? left + tip : left} ${middle - BAR / 2}`,
    `H${held.runsOff.right ? right - tip : right}`,
    held.runsOff.right ? `L${right} ${middle} L${right - tip} ${middle + BAR / 2}` : `V${middle + BAR / 2}`,
    `H${held.runsOff.left ? left + tip : left}`,
    held.runsOff.left ? `L${left} ${middle}` : '',
    'Z',
  ].join(' ');
  const fill = look === 'outline' ? 'fill-paper' : look === 'filled' ? 'fill-rule' : 'fill-bed';
  const inside = band.label !== undefined && labelWidth(band.label) + 24 <= right - left;
  return (
    <>
      <path d={path} className={`${fill} stroke-graphite`} strokeWidth="1" strokeDasharray={look === 'hatched' ? '4 3' : undefined} />
      {inside && (
        <text x={left + 14} y={middle + 4.5} className="fill-graphite text-[13px]">
          {band.label}
        </text>
      )}
    </>
  );
}

function TickDrawing({ tick, most, base, scale }: { readonly tick: Tick; readonly most: number; readonly base: number; readonly scale: RuleScale }) {
  const left = scale.x(tick.from);
  const right = scale.x(tick.to + 1);
  const tall = TICK.least + (TICK.most - TICK.least) * (most > 0 ? tick.share / most : 0);
  const fill = tick.tone === null ? 'fill-graphite' : FILLS[tick.tone];
  const middle = (left + right) / 2;
  if (right - left > TICK.width * 3) return <rect x={left} y={base - tall} width={right - left} height={tall} className={fill} opacity="0.85" />;
  return (
    <g className={fill}>
      <rect x={middle - TICK.width / 2} y={base - tall} width={TICK.width} height={tall} />
      <rect x={middle - 4.5} y={base - tall} width="9" height="2.5" />
    </g>
  );
}

function WindowDrawing({ lane, base, scale, length }: { readonly lane: Extract<Lane, { kind: 'window' }>; readonly base: number; readonly scale: RuleScale; readonly length: number }) {
  const left = scale.x(lane.span.from);
  const right = Math.max(scale.x(lane.span.to + 1), left + 3);
  const room = labelWidth(lane.label) + 8;
  const toTheRight = right + room <= length;
  return (
    <>
      <rect x={left} y={base - 10 - BAR / 2} width={right - left} height={BAR} className="fill-verdigris" />
      {lane.likely !== undefined && (
        <path d={`M${scale.x(lane.likely)} ${base - 10 - BAR / 2 - 2}v-5m-4 0h8`} className="fill-none stroke-verdigris" strokeWidth="2" />
      )}
      <text x={toTheRight ? right + 8 : left - 8} y={base - 5} textAnchor={toTheRight ? 'start' : 'end'} className="fill-verdigris text-[14px] font-semibold">
        {lane.label}
      </text>
    </>
  );
}

/** The window's edges drawn through every lane, so that the eye can hold a date against it. */
function Guides({ lanes, scale, left, height }: { readonly lanes: readonly Lane[]; readonly scale: RuleScale; readonly left: number; readonly height: number }) {
  return lanes.map((lane) => {
    if (lane.kind !== 'window') return null;
    const from = left + scale.x(lane.span.from);
    const to = left + scale.x(lane.span.to + 1);
    return (
      <g key={lane.name}>
        <rect x={from} y="0" width={Math.max(to - from, 1)} height={height} className="fill-verdigris" opacity="0.12" />
        <path d={`M${from} 0V${height}M${to} 0V${height}`} className="stroke-verdigris" strokeWidth="1" strokeDasharray="2 3" />
      </g>
    );
  });
}

function Scale({ scale, left, top, length }: { readonly scale: RuleScale; readonly left: number; readonly top: number; readonly length: number }) {
  const long = scale.marks.flatMap(({ day, label }) => (label === null ? [] : [{ at: scale.x(day), text: label }]));
  return (
    <g transform={`translate(${left} ${top + 8})`}>
      <path d={`M0 0H${length}`} className="stroke-graphite" strokeWidth="1.5" />
      {scale.marks.map(({ day, label }) => (
        <path
          key={day}
          d={`M${scale.x(day)} 0v${label === null ? 6 : 10}`}
          className={label === null ? 'stroke-slag' : 'stroke-graphite'}
          strokeWidth={label === null ? 1 : 1.5}
        />
      ))}
      {axisLabels(long, length).map(({ key, text, x }) => (
        <text key={key} x={x} y="26" textAnchor="middle" className="fill-graphite text-[14px]">
          {text}
        </text>
      ))}
    </g>
  );
}

function RuleTable({ rows, title }: { readonly rows: readonly LaneRow[]; readonly title: string }) {
  return (
    <details className="mt-2">
      <summary className="inline-flex min-h-11 cursor-pointer items-center text-[15px] text-slag underline underline-offset-4">The same as a table</summary>
      <DataTable
        caption={title}
        rows={rows}
        rowKey={({ key }) => key}
        columns={[
          { key: 'lane', header: 'What', cell: ({ lane }) => lane, rowHeader: true },
          { key: 'dates', header: 'dates', cell: ({ dates }) => dates },
          { key: 'note', header: 'note', cell: ({ note }) => note },
        ]}
      />
    </details>
  );
}
