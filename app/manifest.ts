import type { MetadataRoute } from 'next';

/** What a device needs to install Cagewright; it opens on the side that works without a network. */
export default function manifest(): MetadataRoute.Manifest {
  return {
    id: '/field',
    name: 'Cagewright',
    short_name: 'Cagewright',
    description: 'Pre-pour inspection of reinforcement and concrete cover.',
    lang: 'en',
    start_url: '/field',
    scope: '/',
    display: 'standalone',
    background_color: '#e9e6da',
    theme_color: '#e9e6da',
    categories: ['productivity', 'utilities'],
    icons: [
      { src: '/icons/cage.svg', sizes: 'any', type: 'image/svg+xml', purpose: 'any' },
      { src: '/icons/cage-192.png', sizes: '192x192', type: 'image/png', purpose: 'any' },
      { src: '/icons/cage-512.png', sizes: '512x512', type: 'image/png', purpose: 'any' },
      { src: '/icons/cage-maskable-192.png', sizes: '192x192', type: 'image/png', purpose: 'maskable' },
      { src: '/icons/cage-maskable-512.png', sizes: '512x512', type: 'image/png', purpose: 'maskable' },
    ],
    shortcuts: [
      { name: 'Pours on this device', url: '/field' },
      { name: 'Not sent yet', url: '/field/not-sent' },
      { name: 'Pours in the office', url: '/pours' },
    ],
  };
}
