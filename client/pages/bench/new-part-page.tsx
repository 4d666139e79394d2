import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import type { z } from 'zod';
import { recordPart } from '#contract/parts.ts';
import type { Me } from '#contract/people.ts';
import { NEW_PART, newPartOf, PartDraft } from '../../features/parts/part-draft.ts';
import { PartForm } from '../../features/parts/part-form.tsx';
import { partKeys, partPage } from '../../features/parts/parts-queries.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { photoKeys } from '../../features/photos/photo-queries.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useSessionDraft } from '../../lib/session-draft.ts';
import { useRequestKey } from '../../lib/use-request-key.ts';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { AboutTheBench } from './about-the-bench.tsx';

export function Component() {
  return (
    <SignedInOnly title="A new part" about={<AboutTheBench />}>
      {(viewer) => <NewPart viewer={viewer} />}
    </SignedInOnly>
  );
}

function NewPart({ viewer }: { readonly viewer: Me }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const draft = useSessionDraft(`new-part:${viewer.id}`, NEW_PART, PartDraft);
  const keyOf = useRequestKey();
  const act = useMutation({
    mutationFn: (body: z.output<typeof recordPart.body>) => call(recordPart, { body, key: keyOf(body) }),
    onSuccess: async (part) => {
      queryClient.setQueryData(partPage(part.id).queryKey, part);
      void queryClient.invalidateQueries({ queryKey: partKeys.allMine });
      void queryClient.invalidateQueries({ queryKey: photoKeys.unused });
      await navigate(paths.part(part.id));
      draft.drop();
    },
  });
  return (
    <>
      <PageTitle title="A new part" above={<Link to={paths.bench()}>Bench</Link>} below="A photo is enough to begin with. Everything else can come later.">
        A new part
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PartForm
          draft={draft}
          isNew
          check={newPartOf}
          act={act}
          words={{ submit: 'Put it on record', refused: 'It is not on record yet' }}
          cancel={{ to: paths.bench(), text: 'Back to the bench' }}
        />
      </div>
    </>
  );
}
