import type { ClockView } from '../figures/clock-view.js';
import type { Findings } from '../model/index.js';
import { html, type Markup } from './html.js';
import { methodsText } from './methods-text.js';
import { citations } from './sources.js';

/** How the answer was reached, with the settings of the run, its inputs, and the sources of the methods that ran. */
export function methods(findings: Findings, views: readonly ClockView[]): Markup {
  const { cite, list } = citations();
  // the text comes first: it is what numbers the sources
  const text = methodsText(findings, views, cite);
  return html`${text}
${diagnostics(findings)}
<h3>Settings</h3>
<dl class="settings">${settings(findings).map(([name, value]) => html`<div><dt>${name}</dt><dd>${value}</dd></div>`)}</dl>
<h3>Input</h3>
<ul class="inputs">${findings.inputs.map((input) => html`<li>${input.role}: ${input.file}, ${input.rows} rows, SHA-256 <code>${input.sha256}</code></li>`)}</ul>
<h3>Sources</h3>
${list()}
<p>To cite: bedorder ${findings.version}, with the settings and input checksums above; the same input, settings and seed give the same results.</p>`;
}

function diagnostics(findings: Findings): Markup | null {
  if (findings.diagnostics.length === 0) return null;
  return html`<ul>${findings.diagnostics.map(
    (row) =>
      html`<li>Order on ${row.clock}: ${row.chains} chains, ${row.draws} draws, least effective sample size ${Math.round(row.ess_min)}, largest split R-hat ${row.rhat_max.toFixed(3)}: ${row.converged ? 'settled' : html`<strong>not settled, take the ranks with care</strong>`}. ${row.relations_kept} relations bound the order, ${row.relations_left_out} were left out.</li>`,
  )}</ul>`;
}

function settings(findings: Findings): [string, string][] {
  const { options } = findings;
  const words = (value: unknown) =>
    value === null ? 'chosen by the program' : Array.isArray(value) ? value.join(', ') : String(value);
  return [
    ['taxon', options.taxon ?? 'all'],
    ['amino_acid', words(options.amino_acid)],
    ['fraction', options.fraction ?? 'all'],
    ['zones', words(options.zones)],
    ['alpha', String(options.alpha)],
    ['gradient', options.gradient ?? 'none'],
    ['reference_taxon', options.reference_taxon ?? 'none'],
    ['staircase', options.staircase],
    ...(options.staircase === 'no'
      ? []
      : [['staircase_certain', String(options.staircase_certain)] as [string, string]]),
    ['simulations', String(options.simulations)],
    ['seed', String(options.seed)],
    ...Object.entries(options.screening).map(([name, value]): [string, string] => [
      `screening: ${name}`,
      String(value),
    ]),
  ];
}
