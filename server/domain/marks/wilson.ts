/** The 97.5 % point of the normal distribution: 95 % between both limits. */
const Z = 1.959964;

export type Limits = { readonly low: number; readonly high: number };

/**
 * The 95 % limits on a share of which `agree` of `readers` were seen, by E. B. Wilson, Probable inference, the law of succession, and
 * statistical inference, JASA 22, 1927: centre (p + z²/2n) / (1 + z²/n), half width z √(p(1 − p)/n + z²/4n²) / (1 + z²/n). Of no readers
 * nothing is known: 0 to 1.
 *
 * @example wilsonLimits(8, 10) //=> 0.4902 to 0.9433
 */
export function wilsonLimits(agree: number, readers: number): Limits {
  if (readers === 0) return { low: 0, high: 1 };
  const share = agree / readers;
  const scale = 1 + Z ** 2 / readers;
  const centre = (share + Z ** 2 / (2 * readers)) / scale;
  const half = (Z * Math.sqrt((share * (1 - share)) / readers + Z ** 2 / (4 * readers ** 2))) / scale;
  // Rounding may carry a share of none or all a hair past its bound.
  return { low: Math.max(0, centre - half), high: Math.min(1, centre + half) };
}
