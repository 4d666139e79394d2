import { useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { Slug } from '#contract/common.ts';

/** The `:slug` of an address. What can't be a slug is answered as missing, without asking the register. */
export function slugOf(params: LoaderFunctionArgs['params']): string {
  const slug = Slug.safeParse(params['slug']);
  if (!slug.success) throw new Response(null, { status: 404 });
  return slug.data;
}

export function useSlug(): string {
  return slugOf(useParams());
}
