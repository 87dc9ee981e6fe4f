/** A page whose code is read when it is first opened; the worker has it stored, so no network is asked. */
import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';

/** @param {() => Promise<object>} load  @param {string} name export that draws the page */
export function Later(load, name) {
  let Page = null;
  return function LaterPage(props) {
    const [, arrived] = useState(Boolean(Page));
    useEffect(() => {
      if (!Page) load().then((module) => { Page = module[name]; arrived(true); });
    }, []);
    return Page ? html`<${Page} ...${props}/>` : null;
  };
}
