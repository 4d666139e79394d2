import type { ComponentProps } from 'react';
import { Link } from 'react-router-dom';

type Weight = 'primary' | 'plain';

const SHAPE =
  'inline-flex min-h-11 items-center justify-center gap-2 rounded border px-4 py-2 text-center font-semibold no-underline disabled:cursor-not-allowed';
const WEIGHTS: Readonly<Record<Weight, string>> = {
  primary: 'border-oxide bg-oxide text-chalk hover:border-graphite aria-disabled:opacity-60',
  plain: 'border-edge bg-paper text-graphite hover:border-graphite',
};

/** A button at least 44 px high. `primary` at most once on a screen. */
export function Button({ weight = 'plain', className = '', type = 'button', ...rest }: ComponentProps<'button'> & { readonly weight?: Weight }) {
  return <button type={type} className={`${SHAPE} ${WEIGHTS[weight]} ${className}`} {...rest} />;
}

/** The same for an address. */
export function ButtonLink({ weight = 'plain', className = '', ...rest }: ComponentProps<typeof Link> & { readonly weight?: Weight }) {
  return <Link className={`${SHAPE} ${WEIGHTS[weight]} ${className}`} {...rest} />;
}
