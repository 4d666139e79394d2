import type { DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import { Live } from '../../ui/live.tsx';
import { answerWords, matchWords } from './answer-words.ts';
import type { Tried } from './answer-words.ts';

type Props = { readonly answer: DecodeAnswer; readonly inHand: DecodeResult | null; readonly stale: boolean; readonly tried: Tried };

/** What stands, why, and what would settle it; read out when it changes. */
export function AnswerLines({ answer, inHand, stale, tried }: Props) {
  const { stands, why } = inHand === null ? matchWords(answer, tried) : answerWords(answer, inHand, tried);
  return (
    <>
      <p className={`mt-6 max-w-measure text-[19px] leading-snug ${stale ? 'is-stale-block' : ''}`}>
        <strong className="font-semibold">{stands}</strong> {why}
      </p>
      <Live>{stale ? '' : `${stands} ${why}`}</Live>
    </>
  );
}
