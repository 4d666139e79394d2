import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { recordMark } from '#contract/marks.ts';
import type { PartPage } from '#contract/parts.ts';
import type { Me } from '#contract/people.ts';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { MARK_KINDS, MARK_TECHNIQUES } from '#domain/vocabulary.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { MarkNature } from '../../features/marks/mark-nature.tsx';
import { markKeys, markPage } from '../../features/marks/marks-queries.ts';
import { partKeys, partPage } from '../../features/parts/parts-queries.ts';
import { ActTrouble } from '../../features/people/act-trouble.tsx';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { PhotoPicker, withPhoto } from '../../features/photos/photo-picker.tsx';
import { photoKeys } from '../../features/photos/photo-queries.ts';
import { useUploads } from '../../features/photos/use-uploads.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { isNothingThere, ProblemError } from '../../lib/problem-error.ts';
import { useSessionDraft } from '../../lib/session-draft.ts';
import { useRequestKey } from '../../lib/use-request-key.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import type { SummaryFault } from '../../ui/error-summary.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { AboutTheBench } from './about-the-bench.tsx';

const PICKER = 'mark-photos';

const MarkDraft = z.object({ kind: z.enum(MARK_KINDS), technique: z.enum(MARK_TECHNIQUES), photoIds: z.array(z.string()) });
type MarkDraft = z.infer<typeof MarkDraft>;

export function Component() {
  const { id = '' } = useParams();
  return (
    <SignedInOnly title="A new mark" about={<AboutTheBench />}>
      {(viewer) => <NewMarkOf key={id} id={id} viewer={viewer} />}
    </SignedInOnly>
  );
}

function NewMarkOf({ id, viewer }: { readonly id: string; readonly viewer: Me }) {
  const { data: part, error, refetch } = useQuery(partPage(id));
  if (part !== undefined) return part.can.addMark ? <NewMark part={part} viewer={viewer} /> : <NotFoundPage />;
  if (isNothingThere(error)) return <NotFoundPage />;
  return <div className="pt-8">{error === null ? <Skeleton lines={8} label="Loading the part" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}

/** The only photo of a part is most likely the mark's; of several, one is chosen. */
function begin({ photos, marks }: PartPage): MarkDraft {
  const kind = marks.some((mark) => mark.kind === 'casting-number') ? 'date-code' : 'casting-number';
  return { kind, technique: 'cast', photoIds: photos.length === 1 ? photos.map(({ id }) => id) : [] };
}

function NewMark({ part, viewer }: { readonly part: PartPage; readonly viewer: Me }) {
  const { id, title, photos } = part;
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const { value, change, drop } = useSessionDraft(`new-mark:${id}:${viewer.id}`, begin(part), MarkDraft);
  const [isEarly, setIsEarly] = useState(false);
  const uploads = useUploads((photo) => change((now) => ({ ...now, photoIds: [...withPhoto(now.photoIds, photo.id)] })));
  const keyOf = useRequestKey();
  const record = useMutation({
    mutationFn: ({ photoIds, ...nature }: MarkDraft) => {
      const body = { ...nature, photos: photoIds.map((photoId) => ({ photoId, region: null })), reading: null };
      return call(recordMark, { params: { id }, body, key: keyOf(body) });
    },
    onSuccess: async (mark) => {
      queryClient.setQueryData(markPage(mark.id).queryKey, mark);
      void queryClient.invalidateQueries({ queryKey: partKeys.all });
      void queryClient.invalidateQueries({ queryKey: markKeys.lists });
      void queryClient.invalidateQueries({ queryKey: photoKeys.unused });
      await navigate(paths.readMark(mark.id));
      drop();
    },
  });
  const { error } = record;
  const faults = useMemo(() => (error instanceof ProblemError ? error.faults : []).map(({ message, path }): SummaryFault => ({ message, controlId: path[0] === 'photos' ? PICKER : null })), [error]);
  return (
    <>
      <PageTitle title={`A new mark of ${title}`} above={<Link to={paths.part(id)}>{title}</Link>} below="Say what kind of mark it is and where it is to be seen; then you read it.">
        A new mark
      </PageTitle>
      <PartingLine />
      <form
        noValidate
        className="pt-8"
        onSubmit={(event) => {
          event.preventDefault();
          setIsEarly(uploads.underWay > 0);
          if (!record.isPending && uploads.underWay === 0) record.mutate(value);
        }}
      >
        {faults.length > 0 ? <ErrorSummary title="The mark is not on record yet" faults={faults} /> : <ActTrouble act={record} />}
        <PageGrid>
          <Block
            heading="What it is"
            margin={<p className="text-[15px] leading-snug text-slag">Cast and stamped marks are never mixed: one tells of the pouring, the other of what came after.</p>}
          >
            <MarkNature value={value} onChange={(nature) => change((now) => ({ ...now, ...nature }))} />
          </Block>
          <Block
            heading="Photos of it"
            margin={<p className="text-[15px] leading-snug text-slag">Several, with the light from different sides, read better than one. Without a photo it can be read from the iron, and nobody can confirm it.</p>}
          >
            <PhotoPicker
              id={PICKER}
              uploads={uploads}
              ids={value.photoIds}
              most={PHOTO_LIMITS.ofMark}
              onChange={(amend) => change((now) => ({ ...now, photoIds: [...amend(now.photoIds)] }))}
              beside={{ heading: 'Photos of the part', photos }}
            />
          </Block>
        </PageGrid>
        <div className="mt-8 flex flex-wrap items-center gap-3">
          <Button type="submit" weight="primary" disabled={record.isPending}>
            Put it on record and read it
          </Button>
          <ButtonLink to={paths.part(id)}>Back to the part</ButtonLink>
        </div>
        {isEarly && uploads.underWay > 0 && (
          <p role="alert" className="mt-3 font-semibold text-scale">
            Photos are still being sent. Wait for them, or stop them above.
          </p>
        )}
      </form>
    </>
  );
}
