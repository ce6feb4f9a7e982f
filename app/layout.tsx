/** The root of every page: language, typefaces and the theme the reader chose. */
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { monoExtFont, monoFont, textExtFont, textFont } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Ohmstead', template: '%s · Ohmstead' },
  description: 'Parts list in, kit on the bench, bins restocked.',
  icons: { icon: '/icon.svg' },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f6f1e7' },
    { media: '(prefers-color-scheme: dark)', color: '#1a1917' },
  ],
};

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  // Read here and not in a script, so that the first paint already has the right ground and no inline script is needed.
  const chosen = (await cookies()).get('theme')?.value;
  const theme = chosen === 'paper' || chosen === 'lamp' ? chosen : undefined;
  const fonts = `${textFont.variable} ${textExtFont.variable} ${monoFont.variable} ${monoExtFont.variable}`;
  return (
    <html lang="en" data-theme={theme} className={fonts}>
      <body>{children}</body>
    </html>
  );
}
