/** What each verdict asks for next, in words and keys. */
import { html } from 'htm/preact';
import { t, listed } from './words.js';
import { call, region, site } from './state.js';
import { Icon } from './parts/icon.js';
import { Keep } from './keep.js';
import { PatchShares } from './patches.js';
import { Untested } from './parts/table_marks.js';

/** @param {{answer: object, asked: boolean}} props */
export function VerdictPart({ answer, asked }) {
  if (!asked) return html`<${FirstSteps}/>`;
  const Part = { edge: EdgePart, mosaic: MosaicPart, misfit: MisfitPart, thin: ThinPart }[answer.verdict];
  return Part ? html`<${Part} answer=${answer}/>` : null;
}

function FirstSteps() {
  const root = `#/site/${site.value.id}/plants`;
  return html`<section class="part"><ol class="lines">${[1, 2, 3].map((n) => html`<li><b>${n}</b><span>${t(`named.place_${n}`)}</span></li>`)}</ol>
    <p class="deep"><a class="btn go wide" href=${root}><${Icon} name="plants"/>${t('verdict.name_first')}</a></p></section>`;
}

const names = (answer) => {
  const pair = answer.pair.map((id) => region.value.zone.get(id));
  return { a: pair[0].short, b: pair[1].short };
};

function EdgePart({ answer }) {
  return html`<section class="part stack"><p class="verdict">${t('verdict.edge', names(answer))}</p><p>${t('verdict.edge_why')}</p><${Untested}/><${Keep} label=${t('keep.as_edge')}/></section>`;
}

function MosaicPart({ answer }) {
  return html`<section class="part stack"><p class="verdict">${t('verdict.mosaic')}</p><p>${t('verdict.mosaic_why', names(answer))}</p><${PatchShares} pair=${answer.pair}/><${Untested}/><${Keep} label=${t('keep.as_mosaic')}/></section>`;
}

function MisfitPart({ answer }) {
  const odd = oddOnes(answer);
  return html`<section class="part stack"><h2>${t('misfit.before')}</h2><ul class="check">
    <li><${Icon} name="place"/><span>${t('misfit.one_ground')}</span></li><li><${Icon} name="plants"/><span>${t('misfit.sown')}</span></li>
    ${odd.length > 0 && html`<li><${Icon} name="alike"/><span>${t('misfit.names', { list: listed(odd) })}</span></li>`}</ul><${Untested}/><${Keep} label=${t('keep.as_misfit')}/></section>`;
}

/** The plants that speak most strongly against the leading zone. */
function oddOnes(answer) {
  return answer.reasons.filter((one) => one.kind === 'plant' && one.points_cb < 0).sort((a, b) => a.points_cb - b.points_cb).slice(0, 2).map((one) => region.value.plant.get(one.id).common);
}

function ThinPart({ answer }) {
  const here = region.value;
  const root = `#/site/${site.value.id}/plants`;
  return html`<section class="part"><h2>${t('verdict.help_most')}</h2><ol class="next">${answer.prompts.slice(0, 3).map((one) => {
    const question = here.question.get(one.id);
    return html`<li key=${one.id}><a href=${one.kind === 'plant' ? `${root}/enter/${one.id}` : root}><${Icon} name=${one.kind === 'plant' ? 'plants' : question.digs_cm ? 'dig' : 'zone'}/>
      <span>${one.kind === 'plant' ? t('verdict.look_for', { name: here.plant.get(one.id).common }) : question.ask}</span></a></li>`;
  })}</ol><p class="deep"><a class="btn go wide" href=${root}><${Icon} name="plants"/>${t(call.value.named ? 'verdict.ask_on' : 'verdict.name_first')}</a></p></section>`;
}
