/**
 * New versions of the app: noticed, told, and put to use only when the person says so.
 */
import { isSingleFile } from './files.js';

/**
 * Registers the service worker and watches for a new version.
 *
 * @param {{onWaiting: () => void, onReplaced: () => void, onOffline?: () => void}} tell
 *   onWaiting: a whole new version is on the phone · onReplaced: it has taken over, the page should
 *   load again when no record is open · onOffline: the app now works without a network
 * @returns {Promise<{use: () => boolean, check: () => Promise<void>}|null>} null without service workers
 */
export async function watchVersions(tell) {
  const workers = globalThis.navigator?.serviceWorker;
  if (!workers || !globalThis.isSecureContext || !location.protocol.startsWith('http') || isSingleFile()) return null;
  const wasControlled = Boolean(workers.controller);
  workers.addEventListener('controllerchange', () => (wasControlled ? tell.onReplaced() : tell.onOffline?.()));
  const registration = await workers.register(workerUrl(), { updateViaCache: 'none' });
  const follow = (worker) => worker?.addEventListener('statechange', () => {
    if (worker.state === 'installed' && workers.controller) tell.onWaiting();
  });
  if (registration.waiting && workers.controller) tell.onWaiting();
  follow(registration.installing);
  registration.addEventListener('updatefound', () => follow(registration.installing));
  return {
    /** Puts the waiting version to use. False when none waits. */
    use() {
      registration.waiting?.postMessage('use');
      return Boolean(registration.waiting);
    },
    /** Looks for a new version now; silent without a network. */
    check: () => registration.update().then(() => {}, () => {}),
  };
}

/**
 * sw.js lies beside the page, at the root of the site. The page's policy lets a script address pass
 * only through a named policy.
 */
function workerUrl() {
  const url = new URL('sw.js', document.baseURI).href;
  return globalThis.trustedTypes?.createPolicy('beltbook', { createScriptURL: () => url }).createScriptURL('') ?? url;
}
