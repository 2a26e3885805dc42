/** Keeps the site for use without a network, and offers a new version without forcing it on anyone. */

/** Takes the waiting version: the page reloads with it. */
export type TakeUpdate = () => void;

const worker = new URL("../sw.js", import.meta.url);

let registering: Promise<ServiceWorkerRegistration | undefined> | undefined;

/**
 * Starts keeping every file of this version. Call it once the engine is ready, so that the two do not compete for the
 * network; calling it again does nothing.
 */
export function keepOffline(): Promise<ServiceWorkerRegistration | undefined> {
  registering ??= register();
  return registering;
}

async function register(): Promise<ServiceWorkerRegistration | undefined> {
  if (!("serviceWorker" in navigator)) return undefined;
  try {
    return await navigator.serviceWorker.register(worker, { updateViaCache: "none" });
  } catch (error) {
    console.warn("This browser or address does not allow keeping the page offline.", error);
    return undefined;
  }
}

/**
 * True once the whole site is kept and works without a network; false where it cannot be kept. The document carries it
 * too, as data-offline="ready", for whatever looks from outside.
 */
export async function readyOffline(): Promise<boolean> {
  const registration = await keepOffline();
  if (!registration) return false;
  await navigator.serviceWorker.ready;
  document.documentElement.dataset["offline"] = "ready";
  return true;
}

/** Calls back when a newer version has been fetched whole and waits for the user's word. */
export async function offerUpdate(callback: (take: TakeUpdate) => void): Promise<void> {
  const registration = await keepOffline();
  if (!registration) return;
  const offer = (waiting: ServiceWorker) => callback(() => take(waiting));
  if (registration.waiting && navigator.serviceWorker.controller) offer(registration.waiting);
  registration.addEventListener("updatefound", () => {
    const installing = registration.installing;
    installing?.addEventListener("statechange", () => {
      // Without a controller this is the first version, which has nothing to replace.
      if (installing.state === "installed" && navigator.serviceWorker.controller) offer(installing);
    });
  });
}

function take(waiting: ServiceWorker): void {
  navigator.serviceWorker.addEventListener("controllerchange", () => location.reload(), { once: true });
  waiting.postMessage({ type: "SKIP_WAITING" });
}
