import { existsSync } from 'node:fs';

import { injectManifest } from 'workbox-build';

const source = 'public/sw.js';

/** Puts the list of the page's files into the service worker. Answers how many files it will hold and their bytes. */
export async function serviceWorker(dir) {
  if (!existsSync(source)) return null;
  const { count, size, warnings } = await injectManifest({
    swSrc: source,
    swDest: `${dir}/sw.js`,
    globDirectory: dir,
    globPatterns: ['index.html', '**/*.{js,css,ttf,woff2,png,svg,webmanifest}'],
    globIgnores: ['sw.js'],
    maximumFileSizeToCacheInBytes: 5_000_000,
    // Metro already puts a hash into these names
    dontCacheBustURLsMatching: /\/_expo\/static\/.*-[0-9a-f]{32}\.|\.[0-9a-f]{32}\./,
  });
  for (const warning of warnings) console.warn(warning);
  return { count, size };
}
