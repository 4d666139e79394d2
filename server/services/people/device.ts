import Bowser from 'bowser';

const MOST_CHARACTERS = 100;
/** No browser says more of itself, and a longer text is only work for the patterns that read it. */
const LONGEST_USER_AGENT = 512;
const UNKNOWN = 'An unknown browser';

/** A browser and its system in plain words, as far as its `User-Agent` tells: `Firefox on Linux`. */
export function deviceOf(userAgent: string | undefined): string {
  if (userAgent === undefined || userAgent.trim() === '') return UNKNOWN;
  const { browser, os } = Bowser.parse(userAgent.slice(0, LONGEST_USER_AGENT));
  const words = [browser.name ?? UNKNOWN, ...(os.name === undefined ? [] : [`on ${os.name}`])].join(' ');
  return words.replaceAll(/[^\p{L}\p{N}\p{P} ]/gu, '').slice(0, MOST_CHARACTERS).trim() || UNKNOWN;
}
