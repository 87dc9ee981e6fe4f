/** A page whose code is read when it is first wanted; the worker has it stored, so no network is asked.
 *  Once the app stands, the rest is read while nobody waits. */
import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { useEffect, useState } from 'preact/hooks';

const waiting = [];

/** Counts pages that came late into view, so that the heading can still take the focus. */
export const arrivals = signal(0);

/** @param {() => Promise<object>} load  @param {string} name export that draws the page */
export function Later(load, name) {
  let Page = null;
  const bring = () => load().then((module) => { Page = module[name]; });
  waiting.push(bring);
  return function LaterPage(props) {
    const [, arrived] = useState(Boolean(Page));
    useEffect(() => {
      if (Page) return;
      bring().then(() => {
        arrived(true);
        arrivals.value += 1;
      });
    }, []);
    return Page ? html`<${Page} ...${props}/>` : null;
  };
}

/** Reads what is still waiting, one after another, each in an idle moment. */
export function readAhead() {
  const idle = globalThis.requestIdleCallback ?? ((work) => setTimeout(work, 50));
  const next = () => {
    const bring = waiting.shift();
    // A page that cannot be read ahead is asked for again when it is opened, and told then.
    if (bring) idle(() => bring().catch(() => {}).then(next));
  };
  next();
}
