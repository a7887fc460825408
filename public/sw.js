/* Holds the page's own files, so that it opens without reception. The build writes the list. Nothing of /api is kept here. */
const manifest = self.__WB_MANIFEST;
const version = manifest.map((entry) => `${entry.url}:${entry.revision ?? ''}`).join('|');
const hash = Array.from(version)
  .reduce((sum, letter) => (Math.imul(sum, 31) + letter.charCodeAt(0)) | 0, 7)
  .toString(16);
const cacheName = `yardbell-${hash}`;

async function install() {
  const cache = await caches.open(cacheName);
  await cache.addAll(
    manifest.map((entry) => new Request(`/${entry.url}`, { cache: entry.revision ? 'reload' : 'default' })),
  );
  await self.skipWaiting();
}

async function activate() {
  const names = await caches.keys();
  const old = names.filter((name) => name.startsWith('yardbell-') && name !== cacheName);
  await Promise.all(old.map((name) => caches.delete(name)));
  await self.clients.claim();
}

self.addEventListener('install', (event) => event.waitUntil(install()));
self.addEventListener('activate', (event) => event.waitUntil(activate()));
self.addEventListener('fetch', (event) => {
  const { request } = event;
  const url = new URL(request.url);
  if (request.method !== 'GET' || url.origin !== self.location.origin || url.pathname.startsWith('/api/')) return;
  if (request.mode === 'navigate') {
    event.respondWith(fetch(request).catch(() => caches.match('/index.html', { cacheName })));
    return;
  }
  event.respondWith(caches.match(request, { cacheName }).then((hit) => hit ?? fetch(request)));
});
