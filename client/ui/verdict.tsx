import type { FitmentVerdict } from '#domain/vocabulary.ts';
import type { FitVerdict } from '#domain/fit/fit.ts';
import { Icon } from './icon.tsx';
import type { IconName } from './icon.tsx';

export type TypeVerdict = FitmentVerdict | 'not-in-catalogue';
export type VerdictKind = FitVerdict | TypeVerdict;

export type Tone = 'verdigris' | 'straw' | 'temper' | 'scale' | 'slag';
export const TEXT_TONES: Readonly<Record<Tone, string>> = {
  verdigris: 'text-verdigris',
  straw: 'text-straw',
  temper: 'text-temper',
  scale: 'text-scale',
  slag: 'text-slag',
};

export const VERDICTS: Readonly<Record<VerdictKind, { readonly word: string; readonly icon: IconName; readonly tone: Tone }>> = {
  'in-step': { word: 'In step', icon: 'check', tone: 'verdigris' },
  possible: { word: 'Possible', icon: 'around', tone: 'straw' },
  'older-stock': { word: 'Older stock', icon: 'before', tone: 'temper' },
  'cast-after-build': { word: 'Cast after build', icon: 'after', tone: 'scale' },
  unsettled: { word: 'Unsettled', icon: 'question', tone: 'straw' },
  'as-built': { word: 'As built', icon: 'check', tone: 'verdigris' },
  'later-fits': { word: 'Later type, fits', icon: 'after', tone: 'straw' },
  'earlier-fits': { word: 'Earlier type, fits', icon: 'before', tone: 'straw' },
  'does-not-belong': { word: 'Does not belong', icon: 'cross', tone: 'scale' },
  'not-in-catalogue': { word: 'Not in catalogue', icon: 'dash', tone: 'slag' },
};

/** A verdict: its icon, its word, its colour. Never the colour alone. */
export function Verdict({ kind, size = 'text' }: { readonly kind: VerdictKind; readonly size?: 'text' | 'heading' }) {
  const { word, icon, tone } = VERDICTS[kind];
  const scale = size === 'heading' ? 'text-[26px] leading-tight' : '';
  return (
    <span className={`inline-flex items-center gap-1.5 font-semibold ${TEXT_TONES[tone]} ${scale}`}>
      <Icon name={icon} />
      {word}
    </span>
  );
}
