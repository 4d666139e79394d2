import type { CandidateAnswer } from '#contract/decode.ts';
import { fieldWord } from './divisions.ts';

/** How a candidate reads the mark: its groups underlined, and what each stands for. */
export function ReadAs({ candidate }: { readonly candidate: CandidateAnswer }) {
  const groups = candidate.spans.filter(({ end, start }) => end > start);
  const details = Object.entries(candidate.details);
  return (
    <>
      <span className="block font-mono">
        {groups.map(({ field, start, text }) => (
          <span key={`${field} ${start}`} className="mr-2 inline-block border-b border-graphite">
            {text}
          </span>
        ))}
      </span>
      <span className="block text-[15px] text-slag italic">
        {groups
          .filter(({ value }) => value !== null)
          .map(({ field, value }) => `${fieldWord(field)} ${value}`)
          .join(' · ')}
        {details.map(([name, text]) => ` · ${name} ${text}`)}
      </span>
    </>
  );
}
