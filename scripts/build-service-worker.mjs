import { build } from 'esbuild';
import { createHash } from 'node:crypto';
import { readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { injectManifest } from 'workbox-build';
import { root } from './setup/folders.mjs';

const dist = path.join(root, process.env.NEXT_DIST_DIR ?? '.next');
const bundled = path.join(dist, 'service-worker.js');

/** What the shell loads at once and later: its own chunks by name, found in its HTML and in the build's manifests. */
function shellChunks() {
  const html = readFileSync(path.join(dist, 'server/app/field.html'), 'utf8');
  const manifest = readFileSync(
    path.join(dist, 'server/app/field/page_client-reference-manifest.js'),
    'utf8',
  );
  const named = [
    ...`${html}\n${manifest}`.matchAll(/static\/(?:chunks|css|media)\/[\w.~/%@[\]()-]+?\.(?:js|css|woff2)/g),
  ].map(([name]) => decodeURIComponent(name));
  // A chunk may name others that it loads when used.
  const found = new Set(named);
  for (const name of found) {
    if (!name.endsWith('.js')) continue;
    try {
      const text = readFileSync(path.join(dist, name), 'utf8');
      for (const [other] of text.matchAll(/static\/(?:chunks|css|media)\/[\w.~-]+?\.(?:js|css|woff2)/g))
        found.add(other);
    } catch {
      found.delete(name);
    }
  }
  return [...found];
}

await build({
  entryPoints: [path.join(root, 'service-worker/service-worker.ts')],
  outfile: bundled,
  bundle: true,
  minify: true,
  format: 'iife',
  target: 'es2022',
  define: { 'process.env.NODE_ENV': '"production"' },
});
const digest = (file) => createHash('sha256').update(readFileSync(file)).digest('hex').slice(0, 20);
const { count, size, warnings } = await injectManifest({
  swSrc: bundled,
  swDest: path.join(root, 'public/sw.js'),
  globDirectory: dist,
  globPatterns: shellChunks(),
  globIgnores: [],
  dontCacheBustURLsMatching: /^static\//,
  maximumFileSizeToCacheInBytes: 5_000_000,
  modifyURLPrefix: { 'static/': '/_next/static/' },
  manifestTransforms: [
    (entries) => ({
      manifest: entries.map((entry) =>
        entry.url.startsWith('/_next/static/') ? { ...entry, revision: null } : entry,
      ),
      warnings: [],
    }),
  ],
  additionalManifestEntries: [
    { url: '/field', revision: digest(path.join(dist, 'server/app/field.html')) },
    {
      url: '/manifest.webmanifest',
      revision: digest(path.join(dist, 'server/app/manifest.webmanifest.body')),
    },
    {
      url: '/vendor/browser-image-compression.js',
      revision: digest(path.join(root, 'public/vendor/browser-image-compression.js')),
    },
    ...['barlow', 'barlow-semi-condensed', 'ibm-plex-mono'].flatMap((family) => fontsOf(family)),
  ],
});
rmSync(bundled, { force: true });
for (const warning of warnings) console.warn(warning);
console.log(`Service worker: ${count} files kept offline, ${Math.round(size / 1024)} kB.`);

/** The fonts that the style sheet names, of one family. */
function fontsOf(family) {
  const css = readFileSync(path.join(root, 'app/globals.css'), 'utf8');
  const urls = [...new Set([...css.matchAll(/\/fonts\/[\w.-]+\.woff2/g)].map(([url]) => url))];
  return urls
    .filter(
      (url) =>
        url.replace('/fonts/', '').startsWith(family) &&
        (family !== 'barlow' || !url.includes('semi-condensed')),
    )
    .map((url) => ({ url, revision: digest(path.join(root, 'public', url)) }));
}
