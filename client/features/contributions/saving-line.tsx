import { sayFailure } from '../../lib/say-failure.ts';
import type { Saving } from './draft-store.ts';

const CLOCK = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** Where the words of the draft are: said quietly while all is well, read out when it is not. */
export function SavingLine({ saving, onAgain }: { readonly saving: Saving; readonly onAgain: () => void }) {
  if (saving.state === 'kept') {
    const { title } = sayFailure(saving.error);
    return (
      <p role="alert" className="text-[15px] leading-snug">
        <span className="font-semibold text-scale">Not saved: {lowered(title)}.</span> What you typed is kept on this device.{' '}
        <button type="button" className="min-h-11 cursor-pointer text-temper underline" onClick={onAgain}>
          Save now
        </button>
      </p>
    );
  }
  return <p className="text-[15px] text-slag tabular-nums">{sayQuietly(saving)}</p>;
}

function sayQuietly(saving: Exclude<Saving, { readonly state: 'kept' }>): string {
  switch (saving.state) {
    case 'waiting':
      return 'Saving';
    case 'conflict':
      return 'Not saved: it was saved elsewhere too.';
    case 'saved':
      return saving.at === null ? 'Saved as you type.' : `Saved ${CLOCK.format(saving.at)}`;
  }
}

function lowered(sentence: string): string {
  return sentence.charAt(0).toLowerCase() + sentence.slice(1);
}
