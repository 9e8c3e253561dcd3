import { copyFileSync, mkdirSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { root } from './setup/folders.mjs';

/** The compressor's worker loads its library by address: from our own origin, never from a public network. */
const library = createRequire(import.meta.url).resolve(
  'browser-image-compression/dist/browser-image-compression.js',
);
mkdirSync(path.join(root, 'public', 'vendor'), { recursive: true });
copyFileSync(library, path.join(root, 'public', 'vendor', 'browser-image-compression.js'));
