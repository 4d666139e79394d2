import { useDrag } from '@use-gesture/react';
import { useRef } from 'react';
import { lightAt, onDial } from './light.ts';
import type { Light } from './light.ts';

/** Half the drawing's width, the lamp's own radius taken off. */
const RIM = 42;

type Props = { readonly light: Light; readonly onChange: (light: Light) => void };

/**
 * The light in the picture's corner, dragged around: a dome seen from the front, low light at its rim. The two sliders below the
 * picture say and do the same for whoever does not drag.
 */
export function LightDial({ light, onChange }: Props) {
  const dial = useRef<SVGSVGElement>(null);
  const bind = useDrag(
    ({ xy: [x, y], event }) => {
      event.stopPropagation();
      const room = dial.current?.getBoundingClientRect();
      if (room === undefined || room.width === 0) return;
      const radius = (room.width / 2) * (RIM / 48);
      onChange(lightAt({ x: (x - room.left - room.width / 2) / radius, y: (y - room.top - room.height / 2) / radius }));
    },
    { pointer: { touch: false }, triggerAllEvents: false },
  );
  const { x, y } = onDial(light);
  return (
    <svg
      {...bind()}
      ref={dial}
      viewBox="-48 -48 96 96"
      aria-hidden="true"
      focusable="false"
      className="absolute top-3 right-3 size-20 cursor-pointer touch-none roomy:size-24"
    >
      <circle r={RIM + 4} className="fill-relief-shade" opacity="0.55" />
      <circle r={RIM} className="fill-none stroke-relief" strokeWidth="1.5" />
      <circle r="1.5" className="fill-relief" />
      <path d={`M0 0 ${x * RIM} ${y * RIM}`} className="stroke-lamp" strokeWidth="1" strokeDasharray="3 3" />
      <circle cx={x * RIM} cy={y * RIM} r="9" className="fill-lamp stroke-relief-shade" strokeWidth="1.5" />
    </svg>
  );
}
