import { useParams, useSearchParams } from 'react-router-dom';
import { Id } from '#contract/common.ts';
import { formOf, Kind } from '#contract/kinds.ts';
import type { KindForm } from '#contract/kinds/kind.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { BeginDraft } from '../../features/contributions/begin-draft.tsx';
import { blankPayload } from '../../features/contributions/draft-values.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';

/** Begins a draft of a kind. What the address names of other facts (`?modelId=…`) stands in it from the start. */
export function Component() {
  const kind = Kind.safeParse(useParams()['kind']);
  const [params] = useSearchParams();
  if (!kind.success) return <NotFoundPage />;
  const form = formOf(kind.data);
  const title = `A new ${form.name.toLowerCase()}`;
  return (
    <SignedInOnly title={title}>
      {() => (
        <BeginDraft
          key={kind.data}
          title={title}
          body={{ kind: kind.data, payload: { ...blankPayload(form.fields), ...namedIn(form, params) } }}
        />
      )}
    </SignedInOnly>
  );
}

function namedIn({ fields }: KindForm, params: URLSearchParams): Readonly<Record<string, string>> {
  return Object.fromEntries(
    fields.flatMap(({ key, control }) => {
      const id = Id.safeParse(params.get(key));
      return control === 'fact' && id.success ? [[key, id.data]] : [];
    }),
  );
}
