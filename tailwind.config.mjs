/** Tailwind reads the tokens of src/styles/tokens.css; nothing here holds a colour of its own. */
const token = (name) => `var(--${name})`;
const names = [
  'paper',
  'sheet',
  'sunk',
  'globe',
  'ink',
  'ink-2',
  'ink-3',
  'frame',
  'edge',
  'rule',
  'rule-2',
  'grid',
  'grid-2',
  'ochre',
  'ochre-ink',
  'ochre-wash',
  'ochre-band',
  'kelp',
  'kelp-wash',
  'madder',
  'madder-wash',
  'on-accent',
  'ev-published',
  'ev-fitted',
  'ev-posed',
  'ev-unconstrained',
  'outline',
  'coast',
];

/** @type {import('tailwindcss').Config} */
export default {
  content: ['./src/**/*.{astro,ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    extend: {
      colors: Object.fromEntries(names.map((name) => [name, token(name)])),
      fontFamily: { sans: [token('sans')], serif: [token('serif')] },
      borderRadius: { DEFAULT: token('radius') },
      transitionDuration: { quick: token('m-quick'), calm: token('m-calm') },
    },
  },
};
