/** The look's tokens as Tailwind names. The colours themselves stand once, in app/globals.css, in both themes. */
import type { Config } from 'tailwindcss';

function token(name: string): string {
  return `rgb(var(--${name}-rgb) / <alpha-value>)`;
}

const config: Config = {
  content: [],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: token('paper'),
      sheet: token('sheet'),
      ink: token('ink'),
      soft: token('soft'),
      rule: token('rule'),
      hair: token('hair'),
      edge: token('edge'),
      copper: { DEFAULT: token('copper'), wash: token('copper-wash'), deep: token('copper-deep') },
      mask: { DEFAULT: token('mask'), wash: token('mask-wash') },
      amber: { DEFAULT: token('amber'), wash: token('amber-wash') },
      oxide: { DEFAULT: token('oxide'), wash: token('oxide-wash') },
      // What drawn parts are made of; the same by day and by lamp, but for the outline.
      part: {
        outline: token('part-outline'),
        lead: token('part-lead'),
        blue: token('part-blue'),
        tan: token('part-tan'),
        ceramic: token('part-ceramic'),
        film: token('part-film'),
        can: token('part-can'),
        stripe: token('part-stripe'),
        tantalum: token('part-tantalum'),
        chip: token('part-chip'),
        epoxy: token('part-epoxy'),
        glass: token('part-glass'),
        metal: token('part-metal'),
        print: token('part-print'),
        dark: token('part-dark'),
      },
      band: {
        black: token('band-black'),
        brown: token('band-brown'),
        red: token('band-red'),
        orange: token('band-orange'),
        yellow: token('band-yellow'),
        green: token('band-green'),
        blue: token('band-blue'),
        violet: token('band-violet'),
        grey: token('band-grey'),
        white: token('band-white'),
        gold: token('band-gold'),
        silver: token('band-silver'),
        pink: token('band-pink'),
      },
    },
    borderRadius: { none: '0', full: '9999px' },
    fontFamily: {
      sans: ['var(--font-text)'],
      mono: ['var(--font-values)'],
    },
    fontSize: {
      fine: ['0.8125rem', '1.4'],
      small: ['0.875rem', '1.4'],
      body: ['0.9375rem', '1.42'],
      lead: ['1.0625rem', '1.4'],
      heading: ['1.1875rem', '1.3'],
      title: ['1.625rem', '1.2'],
      figure: ['2.125rem', '1.1'],
      stop: ['2.5rem', '1.05'],
    },
  },
};
export default config;
