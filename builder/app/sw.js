const BUILD = { version: '', files: {} };
/**
 * Keeps one whole version of the app on the phone. The line above is written by the site builder:
 * every file with the first half of its SHA-256. A version is installed whole or not at all, waits until the person
 * puts it to use, and answers without a network from then on. Records are not touched here.
 */
const PREFIX = 'beltbook ';
const CACHE = PREFIX + BUILD.version;
const AT_ONCE = 6;

self.addEventListener('install', (event) => event.waitUntil(install()));
self.addEventListener('activate', (event) => event.waitUntil(dropOlder().then(() => self.clients.claim())));
self.addEventListener('message', (event) => { if (event.data === 'use') self.skipWaiting(); });
self.addEventListener('fetch', (event) => {
  const path = ownPath(event.request);
  if (path !== null) event.respondWith(answer(path, event.request));
});

async function install() {
  const cache = await caches.open(CACHE);
  const waiting = Object.entries(BUILD.files);
  const work = async () => {
    for (let next = waiting.pop(); next; next = waiting.pop()) await keep(cache, ...next);
  };
  const done = await Promise.allSettled(Array.from({ length: AT_ONCE }, work));
  const failed = done.find((one) => one.status === 'rejected');
  if (failed) {
    await caches.delete(CACHE);
    throw failed.reason;
  }
}

/** Takes a file from an older version when its content is the same, else fetches and compares it. */
async function keep(cache, path, hash) {
  const key = keyOf(path, hash);
  const known = await caches.match(key);
  if (known) return cache.put(key, known);
  const response = await fetch(new URL(path, self.registration.scope), { cache: 'no-cache' });
  if (!response.ok) throw new Error(`${path}: ${response.status}`);
  const bytes = await response.arrayBuffer();
  if (await digest(bytes) !== hash) throw new Error(`${path}: not the content of this version`);
  return cache.put(key, new Response(bytes, { headers: { 'Content-Type': response.headers.get('Content-Type') ?? '' } }));
}

async function answer(path, request) {
  const cache = await caches.open(CACHE);
  return (await cache.match(keyOf(path, BUILD.files[path]))) ?? fetch(request);
}

/** The path of a file of this version, or null for anything else. */
function ownPath(request) {
  const { scope } = self.registration;
  const address = request.url.split(/[?#]/)[0];
  if (request.method !== 'GET' || !address.startsWith(scope)) return null;
  const path = decodeURI(address.slice(scope.length)).replace(/(^|\/)$/, '$1index.html');
  return Object.hasOwn(BUILD.files, path) ? path : null;
}

function keyOf(path, hash) {
  return `${self.registration.scope}${path}?hash=${hash}`;
}

async function digest(bytes) {
  const whole = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes));
  return Array.from(whole.slice(0, 16), (byte) => byte.toString(16).padStart(2, '0')).join('');
}

async function dropOlder() {
  const names = await caches.keys();
  await Promise.all(names.filter((name) => name.startsWith(PREFIX) && name !== CACHE).map((name) => caches.delete(name)));
}
