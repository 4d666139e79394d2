import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';

/**
 * Every colour of the interface, for paper and for the dark. Nothing else in the client names a colour; a contrast test
 * reads these two tables, so a token that falls below AA fails the build.
 */
export const THEMES = {
  light: {
    /** page */
    sand: '#F4F1EA',
    /** panels */
    bed: '#E7E1D3',
    /** the ground of fields */
    paper: '#FCFAF6',
    /** lines */
    rule: '#CFC6B4',
    /** outlines of fields and buttons */
    edge: '#857D6C',
    /** text */
    graphite: '#23262A',
    /** secondary text */
    slag: '#5B6068',
    /** the one action colour, and what is written on it */
    oxide: '#9C3B22',
    chalk: '#FCFAF6',
    /** in step */
    verdigris: '#22685A',
    /** unsettled */
    straw: '#7A5810',
    /** older stock, and links */
    temper: '#2F4F86',
    /** cast after build */
    scale: '#7A1F3D',
  },
  dark: {
    sand: '#1B1D20',
    bed: '#262A2E',
    paper: '#141618',
    rule: '#454A50',
    edge: '#858A90',
    graphite: '#ECE7DC',
    slag: '#B1AFA8',
    oxide: '#E38A6B',
    chalk: '#1B1D20',
    verdigris: '#7CC7B2',
    straw: '#DDB662',
    temper: '#9DBBEE',
    scale: '#EE9DB8',
  },
} as const satisfies Record<'light' | 'dark', Record<string, `#${string}`>>;

/** The mark plate is iron under either theme. */
export const IRON = {
  /** the face, at its brightest and darkest */
  'iron-lit': '#4A4E54',
  iron: '#34383D',
  'iron-deep': '#24272B',
  /** raised figures, their lit edge and the shadow they throw */
  relief: '#D9D8D3',
  'relief-lit': '#FFFFFF',
  'relief-shade': '#0E0F11',
  /** what is written on the plate that is no figure */
  scribe: '#BEC2C7',
  /** the tile the light is on */
  lamp: '#F3C66D',
} as const;

type Theme = Readonly<Record<string, string>>;

function asVariables(theme: Theme): Record<string, string> {
  return Object.fromEntries(Object.entries(theme).map(([name, value]) => [`--${name}`, value]));
}

function asReferences(theme: Theme): Record<string, string> {
  return Object.fromEntries(Object.keys(theme).map((name) => [name, `var(--${name})`]));
}

const config: Config = {
  content: [],
  theme: {
    colors: { ...asReferences(THEMES.light), ...asReferences(IRON), transparent: 'transparent', current: 'currentColor' },
    fontFamily: {
      serif: ['"Source Serif 4"', 'Georgia', 'serif'],
      mono: ['"B612 Mono"', 'ui-monospace', 'monospace'],
    },
    screens: { roomy: '640px', wide: '900px' },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    extend: { maxWidth: { measure: '68ch', page: '1184px' } },
  },
  plugins: [
    plugin((api) => {
      api.addBase({
        ':root': { ...asVariables(THEMES.light), ...asVariables(IRON), 'color-scheme': 'light dark' },
        '@media (prefers-color-scheme: dark)': { ':root': asVariables(THEMES.dark) },
        '@media print': { ':root': asVariables({ ...THEMES.light, sand: '#FFFFFF', paper: '#FFFFFF' }) },
      });
    }),
  ],
};

export default config;
