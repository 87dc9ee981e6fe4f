/** The icon set: one pen, 24 grid; tools and places stand on a ground line.
 *  Growth forms are drawn on a 32 grid. Pure drawing: no words. */
import { html } from 'htm/preact';

const GROUND = 'M3 20.5h18';
const ICONS = {
  sun: 'M12 8.2a3.8 3.8 0 1 0 0 7.6a3.8 3.8 0 1 0 0-7.6zM12 2.5V5M12 19v2.5M2.5 12H5M19 12h2.5M5.3 5.3l1.8 1.8M16.9 16.9l1.8 1.8M5.3 18.7l1.8-1.8M16.9 7.1l1.8-1.8',
  find: 'M10.5 4a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13zM15.5 15.5L21 21',
  plus: 'M12 4.5v15M4.5 12h15',
  minus: 'M4.5 12h15',
  close: 'M6 6l12 12M18 6L6 18',
  back: 'M14.5 4.5L7 12l7.5 7.5',
  next: 'M9.5 4.5L17 12l-7.5 7.5',
  down: 'M4.5 9.5L12 17l7.5-7.5',
  undo: 'M8.5 4.5L4.5 8.5l4 4M4.5 8.5H14a5.5 5.5 0 0 1 0 11H8',
  print: 'M7 9V3.5h10V9M7 17H3.5V9h17v8H17M7 14h10v6.5H7z',
  warn: 'M12 3.5L21.5 20.5H2.5zM12 9.5v5M12 17.2v.6',
  check: 'M4 12.5l5.5 5.5L20 6.5',
  source: 'M5 3.5h10l4 4v13H5zM15 3.5v4h4M8.5 12h7M8.5 16h5',
  pen: 'M4 20l1-4L16.5 4.5l3 3L8 19zM14 7l3 3',
  photo: 'M3.5 7.5h4l1.5-3h6l1.5 3h4v12h-17zM12 10a3.5 3.5 0 1 0 0 7a3.5 3.5 0 1 0 0-7z',
  sites: `M6 3.5h11.5v17H6zM9.5 3.5v17M12.5 8H15M12.5 12H15${GROUND}`,
  book: `M5 4h11v16.5H5zM16 6.5h3.5V10H16M16 13h3.5v3.5H16M8 8.5h5${GROUND}`,
  hand: `M4 12.5h11l-4-4M20 17H8.5M15 12.5l-4 4${GROUND}`,
  setup: `M3 8.5h18v7H3zM9.5 8.5v7M14.5 8.5v7M12 11v2${GROUND}`,
  place: `M8 20V3.5l10 4-10 4${GROUND}`,
  plants: `M12 20V7M12 14.5c-4.6 0-7-2.2-7-5.8 4.6 0 7 2.2 7 5.8zM12 11c0-4.4 2.4-6.8 7-6.8 0 4.4-2.4 6.8-7 6.8z${GROUND}`,
  zone: `M4.5 15.5c2.5-1.6 5 1.6 7.5 0s5-1.6 7.5 0M6.5 10.5c1.8-1.4 3.7 1.4 5.5 0s3.7-1.4 5.5 0M9 5.5c1-1 2 1 3 0s2-1 3 0${GROUND}`,
  production: `M6.5 20c0-5-.8-7.5-2.5-9.5M10.5 20c0-7 .2-12 1.5-16M14.5 20c0-5.5.8-9 4.5-12.5${GROUND}`,
  reclaim: `M5 3.5l8 9.5M8.5 16.5l9-7.5M8.5 16.5l1.6 2M11.5 14l1.6 2M14.5 11.5l1.6 2M17.5 9l1.6 2${GROUND}`,
  dig: 'M12 3v9M9 3h6M8 12h8v3.5c0 3-4 5-4 5s-4-2-4-5zM3 20.5h3.5M17.5 20.5H21',
  alike: `M8 20V9M8 13c-3 0-5-1.6-5-4 3 0 5 1.6 5 4zM16 20V9M16 13c3 0 5-1.6 5-4-3 0-5 1.6-5 4z${GROUND}`,
  pin: `M12 20c-3-4-5.5-7-5.5-10.5a5.5 5.5 0 0 1 11 0C17.5 13 15 16 12 20zM12 7.5a2 2 0 1 0 0 4a2 2 0 1 0 0-4z${GROUND}`,
  bag: `M7 20.5C5 15 6 11 8.5 8h7c2.5 3 3.5 7 1.5 12.5M8.5 8L7 4.5h10L15.5 8M10 14h4${GROUND}`,
  pit: 'M3 6.5h5v8h8v-8h5M3 20.5h18M10 11h4',
  test: `M5 20V11M10 20V7M15 20v-6M20 20V5${GROUND}`,
};

const LINE = 'M3 29.5h26';
const FORMS = {
  tree: 'M16 29V17M16 23l-4-4M16 21l4-4M16 3.5c5 0 8 3.5 8 7.5s-3 7.5-8 7.5-8-3.5-8-7.5 3-7.5 8-7.5z',
  conifer: 'M16 29v-4M16 3l-4 7h8zM16 8l-6 9h12zM16 14l-8 11h16z',
  shrub: 'M16 29v-5M16 24c-3-1-5-4-6-7M16 24c3-1 5-4 6-7M5 16c0-3 3-5 5.5-4.5C12 8.5 20 8.5 21.5 11.5 24 11 27 13 27 16s-3 4-5.5 3.5H10.5C8 20 5 19 5 16z',
  subshrub: 'M16 29c-4-1-7-3-9-6M16 29c4-1 7-3 9-6M16 29v-8M4.5 22c0-2.5 2.5-4 4.5-3.5 1.5-2.5 12.5-2.5 14 0 2-.5 4.5 1 4.5 3.5',
  grass: 'M16 29c-1-9-4-14-8-17M16 29c-.5-10 0-16 1-23M16 29c1-9 4-13 8-16M16 29c-3-6-6-8-10-9M16 29c3-6 6-8 10-9',
  sedge: 'M13 29c0-9-1-15-4-20M16 29V8M19 29c0-9 1-15 4-20M16 8c-1.5-1-1.5-3 0-5 1.5 2 1.5 4 0 5zM14.5 12h3M14.5 15h3',
  forb: 'M16 29V13M16 24c-4 0-7-2-7-5 4 0 7 2 7 5zM16 21c4 0 7-2 7-5-4 0-7 2-7 5zM16 4.5a4.2 4.2 0 1 0 0 8.4a4.2 4.2 0 1 0 0-8.4z',
  cactus: 'M11 29V12a5 5 0 0 1 10 0v17M11 21H8.5a3 3 0 0 1-3-3v-3M21 18h2.5a3 3 0 0 0 3-3v-2M16 11v3M16 18v3M16 24v3',
  fern: 'M16 29V6M16 24c-4 0-7-1-9-3M16 24c4 0 7-1 9-3M16 18c-3 0-6-1-7-3M16 18c3 0 6-1 7-3M16 12c-2 0-4-1-5-2.5M16 12c2 0 4-1 5-2.5',
  moss: 'M6 29c0-4 0-6-1-8M11 29c0-6 0-9-1-11M16 29c0-5 0-8 0-10M21 29c0-6 0-9 1-11M26 29c0-4 0-6 1-8',
};
const FORM_OF = {
  grass_bunch: 'grass', grass_sod: 'grass', grass_annual: 'grass', sedge_rush: 'sedge', dwarf_shrub: 'subshrub',
  forb_perennial: 'forb', forb_biennial: 'forb', forb_annual: 'forb', succulent: 'cactus', lichen: 'moss',
};

/** @param {{name: keyof typeof ICONS, class?: string}} props */
export function Icon({ name, class: extra = '' }) {
  return html`<svg class=${`icon ${extra}`} viewBox="0 0 24 24" aria-hidden="true"><path d=${ICONS[name]}/></svg>`;
}

/** A growth form standing on its ground line; an unknown form draws a forb. @param {{form: string}} props */
export function Form({ form }) {
  const shape = FORMS[FORM_OF[form] ?? form] ?? FORMS.forb;
  return html`<svg class="form" viewBox="0 0 32 32" aria-hidden="true"><path d=${shape + LINE}/></svg>`;
}
