import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { chooseNotices } from '#contract/notices.ts';
import { NOTICE_KINDS } from '#domain/vocabulary.ts';
import type { NoticeKind } from '#contract/notices.ts';
import { call } from '../../lib/call.ts';
import { capital } from '../../lib/say-number.ts';
import { CheckField } from '../../ui/check-field.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { NOTICE_NAMES } from './notice-words.ts';
import { noticeChoices } from './notices-queries.ts';

type Choice = { readonly kind: NoticeKind; readonly wanted: boolean };

/** Which notices also come by e-mail; each box is kept as it is ticked. */
export function NoticeChoicesPart() {
  const queryClient = useQueryClient();
  const { data, error, refetch } = useQuery(noticeChoices());
  const choose = useMutation({
    mutationFn: ({ kind, wanted }: Choice) => call(chooseNotices, { body: { byEmail: { [kind]: wanted } } }),
    onSuccess: (answer) => queryClient.setQueryData(noticeChoices().queryKey, answer),
  });
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  if (data === undefined) return <Skeleton lines={7} label="Loading your choices" />;
  const { variables } = choose;
  const shown = choose.isPending && variables !== undefined ? { ...data.byEmail, [variables.kind]: variables.wanted } : data.byEmail;
  return (
    <>
      <p className="max-w-measure">All notices stand under the bell. Letters also come about:</p>
      {choose.isError && <FailureNote error={choose.error} onAgain={() => choose.mutate(choose.variables)} />}
      <div role="group" aria-label="Notices that also come by e-mail" className="grid py-2 roomy:grid-cols-2">
        {NOTICE_KINDS.map((kind) => (
          <CheckField
            key={kind}
            label={capital(NOTICE_NAMES[kind])}
            checked={shown[kind]}
            onChange={({ target }) => {
              if (!choose.isPending) choose.mutate({ kind, wanted: target.checked });
            }}
          />
        ))}
      </div>
      <p role="status" className="min-h-6 text-[15px] text-slag">
        {choose.isSuccess && 'Kept.'}
      </p>
    </>
  );
}
