/** The two typefaces, served from this application; licences lie beside the files (SIL Open Font License 1.1). */
import localFont from 'next/font/local';

// latin-ext is a second family further down the stack: a browser fetches it only when a page shows such a letter.
// next/font reads these calls at build time and takes literals only, so the range stands twice.
export const textFont = localFont({
  src: '../public/fonts/atkinson-hyperlegible-next-latin.woff2',
  weight: '200 800',
  style: 'normal',
  display: 'swap',
  variable: '--font-next',
  fallback: ['system-ui', 'sans-serif'],
});

export const textExtFont = localFont({
  src: '../public/fonts/atkinson-hyperlegible-next-latin-ext.woff2',
  weight: '200 800',
  style: 'normal',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  variable: '--font-next-ext',
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+20A0-20AB,U+20AD-20C0,U+2C60-2C7F,U+A720-A7FF',
    },
  ],
});

export const monoFont = localFont({
  src: '../public/fonts/atkinson-hyperlegible-mono-latin.woff2',
  weight: '200 800',
  style: 'normal',
  display: 'swap',
  variable: '--font-mono-latin',
  fallback: ['ui-monospace', 'monospace'],
});

export const monoExtFont = localFont({
  src: '../public/fonts/atkinson-hyperlegible-mono-latin-ext.woff2',
  weight: '200 800',
  style: 'normal',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
  variable: '--font-mono-ext',
  declarations: [
    {
      prop: 'unicode-range',
      value:
        'U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+20A0-20AB,U+20AD-20C0,U+2C60-2C7F,U+A720-A7FF',
    },
  ],
});
