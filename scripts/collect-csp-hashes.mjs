import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './setup/folders.mjs';

/**
 * A static page cannot carry a nonce: its inline scripts are allowed by their hashes, collected here after the build
 * into `csp-hashes.json` beside it, by path. proxy.ts reads them.
 */
const dist = path.join(root, process.env.NEXT_DIST_DIR ?? '.next');
const pages = path.join(dist, 'server/app');

const inline = /<script(?![^>]*\ssrc=)[^>]*>([\s\S]*?)<\/script>/g;
const hashesOf = (html) => [
  ...new Set(
    [...html.matchAll(inline)].map(
      ([, script]) => `'sha256-${createHash('sha256').update(script, 'utf8').digest('base64')}'`,
    ),
  ),
];

const files = existsSync(pages)
  ? readdirSync(pages, { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.html'))
  : [];
const byPath = Object.fromEntries(
  files.map((file) => {
    const route = `/${file.replace(/\.html$/, '').replaceAll(path.sep, '/')}`;
    return [route === '/index' ? '/' : route, hashesOf(readFileSync(path.join(pages, file), 'utf8'))];
  }),
);
writeFileSync(path.join(dist, 'csp-hashes.json'), JSON.stringify(byPath, null, 2));
console.log(`Inline scripts of ${files.length} static pages are allowed by hash.`);
