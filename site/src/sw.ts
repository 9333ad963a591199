// The service worker: it keeps every file of this version, so that the page
// starts without a network. A new version waits until the user agrees.

import { cleanupOutdatedCaches, precacheAndRoute } from "workbox-precaching";

declare const self: ServiceWorkerGlobalScope;

// What stands behind "?" never changes which file is meant.
precacheAndRoute(self.__WB_MANIFEST, { ignoreURLParametersMatching: [/.*/] });
cleanupOutdatedCaches();

self.addEventListener("message", (event) => {
  if (event.data === "switch") void self.skipWaiting();
});

// The first visit is served by the network, and its next start by this worker:
// taking over at once lets a phone that loses signal now reload.
self.addEventListener("activate", (event) => event.waitUntil(self.clients.claim()));
