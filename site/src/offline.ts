// Registers the service worker and says when a new version waits.

/** What the page wants to know of the service worker. */
export interface Offline {
  /** every file is kept: the page starts without a network */
  ready(): void;
  /** a new version is loaded and waits; call the function to switch to it */
  waiting(switchNow: () => void): void;
}

export async function register(page: Offline): Promise<void> {
  if (!("serviceWorker" in navigator)) return; // no secure context, or file://
  const registration = await navigator.serviceWorker.register(new URL("sw.js", document.baseURI));
  const offer = (worker: ServiceWorker): void =>
    page.waiting(() => {
      navigator.serviceWorker.addEventListener("controllerchange", () => location.reload(), { once: true });
      worker.postMessage("switch");
    });
  const follow = (worker: ServiceWorker): void =>
    worker.addEventListener("statechange", () => {
      if (worker.state === "installed" && registration.active) offer(worker);
    });
  if (registration.waiting && registration.active) offer(registration.waiting);
  if (registration.installing) follow(registration.installing);
  registration.addEventListener("updatefound", () => follow(registration.installing!));
  await navigator.serviceWorker.ready;
  page.ready();
}
