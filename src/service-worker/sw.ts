/// <reference lib="webworker" />
import { cleanupOutdatedCaches, createHandlerBoundToURL, precacheAndRoute } from 'workbox-precaching'
import { NavigationRoute, registerRoute } from 'workbox-routing'

declare const self: ServiceWorkerGlobalScope & { __WB_MANIFEST: { url: string; revision: string | null }[] }

// Everything the app is made of is kept on the phone at the first visit; nothing is ever fetched from elsewhere.
precacheAndRoute(self.__WB_MANIFEST)
cleanupOutdatedCaches()

// What a person took besides lies in a cache that the page fills and empties; each set of it has an address of its own.
registerRoute(
  ({ url }) => url.origin === location.origin && url.pathname.startsWith('/extras/'),
  async ({ request }) => (await caches.match(request.url)) ?? fetch(request),
)

// Every other address is the one page.
registerRoute(new NavigationRoute(createHandlerBoundToURL('/index.html')))

// The very first visit is served from here at once, so that it can go on without a network.
self.addEventListener('activate', (event) => event.waitUntil(self.clients.claim()))

// A newer worker waits until the person says so on the page.
self.addEventListener('message', (event) => {
  if (event.data?.type === 'SKIP_WAITING') void self.skipWaiting()
})
