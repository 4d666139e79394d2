import { useId, useState } from 'react';
import type { ComponentProps } from 'react';
import { HIGHEST_LIGHT, LOWEST_LIGHT, sayHeight, saySide } from './light.ts';
import type { Light } from './light.ts';
import { BRIGHTNESS_RANGE, CONTRAST_RANGE, isOn, isProcessed, MOST_SMOOTHING, press, toggleAsTaken, withBrightness, withContrast } from './look.ts';
import type { Tool } from './look.ts';
import { RangeField } from './range-field.tsx';
import { mirror, normalTurn, turnBy } from './stage-geometry.ts';
import type { View } from './view.ts';

type Props = {
  readonly view: View;
  readonly onChange: (view: View) => void;
  /** Without WebGL the light can't be moved. */
  readonly hasLight: boolean;
  /** Begins to draw where the mark stands; null for whoever may not, and while it is being drawn. */
  readonly onDraw: (() => void) | null;
};

/** What can be done to the picture: a row of switches, and the finer settings of those that are on. */
export function ViewTools({ view, onChange, hasLight, onDraw }: Props) {
  const [turning, setTurning] = useState(false);
  const turningId = useId();
  const toolButton = (tool: Tool, word: string) => (
    <Switch pressed={isOn(view, tool)} onClick={() => onChange(press(view, tool))}>
      {word}
    </Switch>
  );
  return (
    <div className="no-print mt-3">
      <div role="group" aria-label="The picture" className="flex flex-wrap gap-2">
        <Switch pressed={!isProcessed(view)} onClick={() => onChange(toggleAsTaken(view))}>
          As taken
        </Switch>
        {toolButton('relief', 'Relief')}
        {toolButton('contrast', 'Contrast')}
        {toolButton('invert', 'Invert')}
        <Plain onClick={() => onChange(turnBy(view, 90))}>Turn 90°</Plain>
        <Plain aria-expanded={turning} aria-controls={turningId} onClick={() => setTurning(!turning)}>
          Straighten
        </Plain>
        <Switch pressed={view.mirrored} onClick={() => onChange(mirror(view))}>
          Mirror
        </Switch>
        {onDraw !== null && <Plain onClick={onDraw}>Draw where it stands</Plain>}
      </div>
      {isOn(view, 'relief') && <ReliefSettings view={view} onChange={onChange} hasLight={hasLight} />}
      {isOn(view, 'contrast') && (
        <Settings>
          <RangeField
            label="Contrast"
            value={view.contrast}
            least={CONTRAST_RANGE.least}
            most={CONTRAST_RANGE.most}
            step={0.1}
            said={sayFactor(view.contrast)}
            onChange={(contrast) => onChange(withContrast(view, contrast))}
          />
          <RangeField
            label="Brightness"
            value={view.brightness}
            least={BRIGHTNESS_RANGE.least}
            most={BRIGHTNESS_RANGE.most}
            step={0.1}
            said={sayFactor(view.brightness)}
            onChange={(brightness) => onChange(withBrightness(view, brightness))}
          />
        </Settings>
      )}
      <div id={turningId}>{turning && <TurnSettings view={view} onChange={onChange} />}</div>
    </div>
  );
}

type SettingsProps = Pick<Props, 'view' | 'onChange'>;

function ReliefSettings({ view, onChange, hasLight }: SettingsProps & Pick<Props, 'hasLight'>) {
  const { light, smoothing } = view;
  if (!hasLight) return null;
  const shine = (change: Partial<Light>) => onChange({ ...view, light: { ...light, ...change } });
  return (
    <Settings>
      <RangeField label="Light from" value={Math.round(light.azimuth) % 360} least={0} most={359} step={1} said={`${saySide(light)}, ${Math.round(light.azimuth) % 360}°`} onChange={(azimuth) => shine({ azimuth })} />
      <RangeField label="Its height" value={Math.round(light.elevation)} least={LOWEST_LIGHT} most={HIGHEST_LIGHT} step={1} said={sayHeight(light)} onChange={(elevation) => shine({ elevation })} />
      <RangeField label="Looks for" value={smoothing} least={0} most={MOST_SMOOTHING} step={0.25} said={saySmoothing(smoothing)} onChange={(next) => onChange({ ...view, smoothing: next })} />
    </Settings>
  );
}

function TurnSettings({ view, onChange }: SettingsProps) {
  const by = (degrees: number) => () => onChange(turnBy(view, degrees));
  return (
    <Settings>
      <div className="flex flex-wrap gap-2" role="group" aria-label="Turn in steps">
        <Plain onClick={by(-15)}>15° left</Plain>
        <Plain onClick={by(15)}>15° right</Plain>
      </div>
      <RangeField
        label="Turned"
        value={Number(view.turn.toFixed(1))}
        least={-180}
        most={180}
        step={0.5}
        said={sayTurn(view.turn)}
        onChange={(turn) => onChange({ ...view, turn: normalTurn(turn) })}
      />
    </Settings>
  );
}

function Settings({ children }: Pick<ComponentProps<'div'>, 'children'>) {
  return <div className="mt-3 grid items-end gap-x-6 gap-y-1 border-l-2 border-rule pl-3 roomy:grid-cols-3">{children}</div>;
}

function Plain({ className = '', ...rest }: ComponentProps<'button'>) {
  return (
    <button
      type="button"
      className={`min-h-11 cursor-pointer rounded border border-edge bg-paper px-4 py-2 leading-tight hover:border-graphite ${className}`}
      {...rest}
    />
  );
}

/** On: dark as a key that is down. */
function Switch({ pressed, ...rest }: ComponentProps<'button'> & { readonly pressed: boolean }) {
  return pressed ? (
    <button type="button" aria-pressed="true" className="min-h-11 cursor-pointer rounded border border-graphite bg-graphite px-4 py-2 leading-tight text-sand" {...rest} />
  ) : (
    <Plain aria-pressed="false" {...rest} />
  );
}

function sayFactor(factor: number): string {
  return factor === 1 ? 'as taken' : `${Math.round(factor * 100)} %`;
}

function saySmoothing(smoothing: number): string {
  if (smoothing < 1) return 'every grain';
  if (smoothing < 2) return 'fine strokes';
  return smoothing < 3 ? 'strokes' : 'broad strokes only';
}

function sayTurn(turn: number): string {
  const degrees = Math.abs(Number(turn.toFixed(1)));
  return degrees === 0 ? 'not turned' : `${degrees}° to the ${turn > 0 ? 'right' : 'left'}`;
}
