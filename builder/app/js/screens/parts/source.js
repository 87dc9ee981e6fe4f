/** Where figures come from: one tap opens the sources that stand behind a part of the page. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { t } from '../words.js';
import { Icon } from './icon.js';

/** @param {{what: string, region: object, keys: (string|undefined)[]}} props keys: provenance of the figures: demo, common practice, or source keys */
export function Source({ what, region, keys }) {
  const [open, setOpen] = useState(false);
  const rows = [...new Set(keys.filter(Boolean))];
  if (rows.length === 0) return null;
  return html`<div class="source"><button type="button" class="link small" aria-expanded=${String(open)} onClick=${() => setOpen(!open)}><${Icon} name="source"/>${t('source.key', { what })}</button>
    ${open && html`<ul>${rows.map((key) => html`<li key=${key} class="small">${provenance(region, key)}</li>`)}</ul>`}</div>`;
}

/** One provenance in words. @param {object} region  @param {string} key "demo", "common practice", "published KEY" or KEY */
export function provenance(region, key) {
  if (key === 'demo') return t('source.demo');
  if (key === 'common practice') return t('source.common');
  const source = region.texts.sources?.[key.replace(/^published\s+/, '')];
  return source ? t('source.published', { text: source.text, read: source.read }) : key;
}

/** Which tables scored this record. @param {{region: object, record: object}} props */
export function Tables({ region, record }) {
  return html`<section class="part small quiet"><p>${t('source.tables', { region: region.name, edition: record.edition, hash: record.pack_hash })}</p>
    ${region.pack.region.invented && html`<p>${t('source.invented')}</p>`}</section>`;
}
