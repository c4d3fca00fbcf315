/* global shell */
/*
 * Keeps the swap pages openable without reception: the page without data (the shell) and the hashed files that it is made of.
 * It stands before addresses under /swaps alone, answers of the vault (/api) never pass through a cache of it, and the shell
 * is the same for everybody: nothing of a person or a plant lies here. What a page read is kept by the page itself, and goes
 * with the sign-out (utils/device/copies.ts).
 *
 * `shell` is written before this by the build: { release, files }.
 */
const prefix = 'witnessmark-shell-'
const mine = prefix + shell.release
const page = '/swaps'
/** After so long without an answer the kept shell opens, in ms: reception that hangs is none. */
const patience = 4000

self.addEventListener('install', event => event.waitUntil(install()))
self.addEventListener('activate', event => event.waitUntil(leaveOld()))
self.addEventListener('fetch', (event) => {
  const { request } = event
  const { origin, pathname } = new URL(request.url)
  if (request.method !== 'GET' || origin !== self.location.origin) return
  if (request.mode === 'navigate' && isSwaps(pathname)) event.respondWith(openPage(request))
  else if (pathname.startsWith('/_nuxt/') || pathname === '/favicon.svg') event.respondWith(hashedFile(request))
})

const isSwaps = pathname => pathname === page || pathname.startsWith(`${page}/`)

/** All or nothing: a shell of which a file is missing is none. Without a cookie, so that no answer can be a person's. */
async function install() {
  const cache = await caches.open(mine)
  await cache.addAll([page, ...shell.files].map(path => new Request(path, { cache: 'reload', credentials: 'omit' })))
  // A page that is open meanwhile goes on with its own files (leaveOld keeps them); the next one that opens is of this release.
  await self.skipWaiting()
}

/** Older releases go, but for the last: pages of it may still be open and lack a file. Its shell opens no page any more. */
async function leaveOld() {
  const older = (await caches.keys()).filter(name => name.startsWith(prefix) && name !== mine)
  await Promise.all(older.slice(0, -1).map(name => caches.delete(name)))
}

/** The vault's page while it answers, so that a new release shows at once; else the kept shell. */
async function openPage(request) {
  const kept = await (await caches.open(mine)).match(page)
  if (!kept) return fetch(request)
  const late = new Promise((resolve) => { setTimeout(resolve, patience, kept) })
  // A door before a vault that is down answers too, with a page of its own.
  const answer = fetch(request).then(given => given.status < 500 ? given : kept, () => kept)
  return Promise.race([answer, late])
}

/** A hashed file never changes: kept is as good as sent. */
async function hashedFile(request) {
  return await caches.match(request, { ignoreVary: true }) ?? fetch(request)
}
