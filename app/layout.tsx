import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { SkipLink } from '@/components/ui/skip-link';
import { ThemeAttribute } from '@/components/ui/theme-attribute';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Cagewright', template: '%s · Cagewright' },
  description: 'Pre-pour inspection of reinforcement and concrete cover.',
  applicationName: 'Cagewright',
  appleWebApp: { capable: true, title: 'Cagewright', statusBarStyle: 'default' },
  icons: {
    icon: [
      { url: '/icons/cage.svg', type: 'image/svg+xml' },
      { url: '/icons/cage-192.png', sizes: '192x192', type: 'image/png' },
    ],
    apple: [{ url: '/icons/cage-apple-180.png', sizes: '180x180', type: 'image/png' }],
  },
  formatDetection: { telephone: false, date: false, address: false, email: false },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  viewportFit: 'cover',
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#e9e6da' },
    { media: '(prefers-color-scheme: dark)', color: '#0b1214' },
  ],
};

/**
 * The root of every page. Each page has one element with the id `main`, where the skip link leads. The theme follows
 * the device in CSS alone; a choice kept on the device is applied by ThemeAttribute, which writes an attribute that
 * the server never renders, hence the suppressed warning.
 */
export default function RootLayout({ children }: Readonly<{ children: ReactNode }>) {
  return (
    <html lang="en" suppressHydrationWarning>
      <body>
        <SkipLink />
        <ThemeAttribute />
        {children}
      </body>
    </html>
  );
}
