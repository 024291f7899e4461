import { clockViews } from '../figures/clock-view.js';
import { drawFigures, type Figure } from '../figures/index.js';
import type { Findings } from '../model/index.js';
import { contents } from './contents.js';
import { html, jsonForScript, type Markup, raw } from './html.js';
import { pageData } from './page-data.js';
import { script } from './script.js';
import { sections } from './sections.js';
import { sha256Base64 } from './sha256.js';
import { pageStyle } from './style.js';

/**
 * The report: one HTML page that works offline. Its content security policy lets nothing in but its own style and
 * script, known by their hashes. Every name from the input is escaped. Without script it is a readable page.
 * @param findings what was found
 * @param figures the figures of these findings, where they were drawn already
 */
export function renderReport(findings: Findings, figures: readonly Figure[] = drawFigures(findings)): string {
  const views = clockViews(findings);
  const style = pageStyle(views);
  const policy = [
    "default-src 'none'",
    `style-src 'sha256-${sha256Base64(style)}'`,
    `script-src 'sha256-${sha256Base64(script)}'`,
    'img-src data:',
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  const parts = sections(findings, views, figures);
  return html`<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${raw(policy)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<meta name="generator" content="bedorder ${findings.version}">
<title>Order of the beds: ${surveyName(findings)}</title>
<link rel="icon" href="data:,">
<style>${raw(style)}</style>
</head>
<body>
<a class="skip" href="#findings">Skip to the findings</a>
<header class="top"><p class="brand">bedorder</p><h1>Aminozones and the order of the beds</h1><p class="sub">${subline(findings)}</p></header>
<div class="layout">
${contents(parts, views)}
<main>${parts.map((part) => html`<section id="${part.id}" aria-labelledby="${part.id}-h"><h2 id="${part.id}-h">${part.heading}</h2>${part.body}</section>`)}</main>
</div>
<div id="reader" role="status" aria-live="polite" hidden></div>
<script type="application/json" id="data">${jsonForScript(pageData(views))}</script>
<script>${raw(script)}</script>
</body>
</html>
`.markup;
}

function surveyName(findings: Findings): string {
  return findings.inputs.find((input) => input.role === 'shells')?.file ?? 'survey';
}

function subline(findings: Findings): Markup {
  const files = findings.inputs.map((input) => input.file).join(', ');
  return html`From ${files || 'a survey'}. The order is relative: it is no age.`;
}
