import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { changePart } from '#contract/parts.ts';
import type { PartPage } from '#contract/parts.ts';
import type { Me } from '#contract/people.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { markKeys } from '../../features/marks/marks-queries.ts';
import { ChangedMeanwhile } from '../../features/parts/changed-meanwhile.tsx';
import { changedPartOf, draftOfPart, PartDraft } from '../../features/parts/part-draft.ts';
import { PartForm } from '../../features/parts/part-form.tsx';
import { partKeys, partPage } from '../../features/parts/parts-queries.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { isNothingThere, ProblemError } from '../../lib/problem-error.ts';
import { useSessionDraft } from '../../lib/session-draft.ts';
import { FailureNote } from '../../ui/failure-note.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { AboutTheBench } from './about-the-bench.tsx';

/** What is typed, and the state of the part it was begun on. */
const Change = z.object({ typed: PartDraft, begunOn: PartDraft, revision: z.number(), meanwhile: PartDraft.nullable() });
type Change = z.infer<typeof Change>;

export function Component() {
  const { id = '' } = useParams();
  return (
    <SignedInOnly title="A part" about={<AboutTheBench />}>
      {(viewer) => <ChangeOf key={id} id={id} viewer={viewer} />}
    </SignedInOnly>
  );
}

function ChangeOf({ id, viewer }: { readonly id: string; readonly viewer: Me }) {
  const { data, error, refetch, isFetchedAfterMount } = useQuery({ ...partPage(id), refetchOnMount: 'always' });
  if (data !== undefined && isFetchedAfterMount) return data.can.change ? <ChangePart part={data} viewer={viewer} /> : <NotFoundPage />;
  if (isNothingThere(error)) return <NotFoundPage />;
  return <div className="pt-8">{error === null ? <Skeleton lines={8} label="Loading the part" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}

function begin(part: PartPage): Change {
  const draft = draftOfPart(part);
  return { typed: draft, begunOn: draft, revision: part.revision, meanwhile: null };
}

function ChangePart({ part, viewer }: { readonly part: PartPage; readonly viewer: Me }) {
  const { id, title } = part;
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const { value, change, kept, drop } = useSessionDraft(`part:${id}:${viewer.id}`, begin(part), Change);
  const act = useMutation({
    mutationFn: (body: z.output<typeof changePart.body>) => call(changePart, { params: { id }, body }),
    onSuccess: async (answer) => {
      queryClient.setQueryData(partPage(id).queryKey, answer);
      void queryClient.invalidateQueries({ queryKey: partKeys.allMine });
      void queryClient.invalidateQueries({ queryKey: markKeys.all });
      await navigate(paths.part(id));
      drop();
    },
    onError: async (error) => {
      if (!(error instanceof ProblemError) || error.kind !== 'conflict') return;
      const now = await queryClient.query({ ...partPage(id), staleTime: 0 });
      change((before) => ({ ...before, revision: now.revision, meanwhile: draftOfPart(now) }));
    },
  });
  return (
    <>
      <PageTitle title={`Change ${title}`} above={<Link to={paths.part(id)}>{title}</Link>}>
        Change what is on record
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PartForm
          draft={{ value: value.typed, change: (amend) => change((now) => ({ ...now, typed: amend(now.typed) })), kept, drop }}
          isNew={false}
          check={(draft) => changedPartOf(draft, value.revision)}
          act={act}
          words={{ submit: 'Save the change', refused: 'The change is not saved' }}
          cancel={{ to: paths.part(id), text: 'Back to the part' }}
          notice={
            <>
              {value.meanwhile !== null && <ChangedMeanwhile before={value.begunOn} now={value.meanwhile} />}
              {part.visibility === 'by-link' && (
                <p className="mb-6 max-w-measure border-l-4 border-straw bg-bed px-4 py-3">So far whoever has its address sees it. Saved from here, it is private or public, as you choose below.</p>
              )}
            </>
          }
        />
      </div>
    </>
  );
}
