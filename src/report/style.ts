import type { ClockView } from '../figures/clock-view.js';

/** The page's style: fixed, but for the zones' colours. */
export function pageStyle(views: readonly ClockView[]): string {
  const chips = views.flatMap((view) =>
    view.inks.map((ink, i) => `.z${view.index}-${i}{background:${ink.fill};color:${ink.type}}`),
  );
  return `${STYLE}\n${chips.join('\n')}\n`;
}

const STYLE = `
:root{--ink:#1b1a19;--soft:#57534d;--faint:#8c867d;--grid:#e2ddd5;--paper:#ffffff;--page:#f6f3ee;--alarm:#b3261e;--link:#1f4f7a;--line:#d8d2c8;--mark:#fff2c9}
@media (prefers-color-scheme:dark){:root{--ink:#ece8e1;--soft:#b9b2a7;--faint:#8f887d;--grid:#3a3733;--paper:#1d1c1a;--page:#141312;--alarm:#ff9d8f;--link:#9cc7ee;--line:#3d3a36;--mark:#4a3f1c}}
*{box-sizing:border-box}
html{color-scheme:light dark;scroll-behavior:smooth;scroll-padding-top:1rem;-webkit-text-size-adjust:100%}
@media (prefers-reduced-motion:reduce){html{scroll-behavior:auto}}
body{margin:0;background:var(--page);color:var(--ink);font:16px/1.55 Charter,"Bitstream Charter",Cambria,Georgia,serif}
a{color:var(--link);text-underline-offset:.15em;text-decoration-thickness:.06em}
a:hover{text-decoration-thickness:.12em}
:focus-visible{outline:3px solid var(--link);outline-offset:2px;border-radius:2px}
.skip{position:absolute;left:-99rem}
.skip:focus{left:1rem;top:1rem;background:var(--paper);padding:.5rem 1rem;z-index:9}
.top{padding:2.6rem clamp(1rem,4vw,3.5rem) 1.6rem;border-bottom:1px solid var(--line);background:var(--paper)}
.top .brand{margin:0;font:600 .8rem/1 Helvetica,Arial,sans-serif;letter-spacing:.14em;color:var(--soft)}
h1{margin:.5rem 0 .3rem;font-size:clamp(1.6rem,4vw,2.5rem);line-height:1.12;font-weight:600;letter-spacing:-.012em;text-wrap:balance}
.sub{margin:0;color:var(--soft);overflow-wrap:anywhere}
.layout{display:grid;grid-template-columns:14rem minmax(0,1fr);gap:clamp(1.5rem,3.5vw,3.5rem);padding:0 clamp(1rem,4vw,3.5rem) 6rem;max-width:92rem;margin:0 auto}
.side{position:sticky;top:0;align-self:start;max-height:100vh;overflow-y:auto;padding:1.8rem .3rem 2rem;font:.875rem/1.4 Helvetica,Arial,sans-serif}
.toc{list-style:none;margin:0;padding:0}
.toc a{display:block;padding:.22rem 0 .22rem .7rem;border-left:2px solid var(--line);color:var(--soft);text-decoration:none}
.toc a:hover{color:var(--ink);border-color:var(--ink)}
.sidehead{margin:1.5rem 0 .4rem;font-weight:700}
.zonekey{display:flex;gap:.55rem;align-items:center;width:100%;padding:.2rem;border:0;background:none;color:inherit;font:inherit;text-align:left}
.zonekey:not(:disabled){cursor:pointer}
.zonekey[aria-pressed=true]{font-weight:700}
.chip{display:inline-block;min-width:2.1em;padding:.05em .4em;border-radius:3px;border:1px solid var(--ink);font:700 .8125rem/1.35 Helvetica,Arial,sans-serif;text-align:center}
.filters label{display:block;margin:.35rem 0;color:var(--soft)}
.filters select{display:block;width:100%;padding:.3rem;border:1px solid var(--faint);border-radius:3px;background:var(--paper);color:var(--ink);font:inherit}
.count,.hint{color:var(--soft);font-size:.8125rem}
kbd{border:1px solid var(--faint);border-radius:3px;padding:0 .3em;font:inherit}
main{min-width:0}
section{padding-top:2.2rem}
h2{margin:0 0 1rem;font-size:1.55rem;line-height:1.2;font-weight:600;letter-spacing:-.01em}
h3{margin:1.6rem 0 .5rem;font:700 1rem/1.3 Helvetica,Arial,sans-serif}
p,ul,ol,dl{max-width:44rem}
.lead p{font-size:1.17rem;line-height:1.6;margin:0 0 1.1rem}
.remarks{padding-left:1.1rem}
.remarks.caution li::marker{content:"! ";font-weight:700;color:var(--alarm)}
.remarks.caution li{padding-left:.3rem}
figure{margin:0 0 2.4rem;max-width:64rem}
figure.narrow{max-width:34rem}
figure h3{margin:.2rem 0 .6rem}
.figbox{overflow-x:auto;background:var(--paper);border:1px solid var(--line);border-radius:4px;padding:1rem}
.figbox svg{display:block;width:100%;height:auto;min-width:42rem}
.narrow .figbox svg{min-width:20rem}
figcaption{margin:.65rem 0 0;color:var(--soft);font-size:.9375rem;line-height:1.5;max-width:52rem}
figcaption b{color:var(--ink)}
.save{margin-left:.3rem;padding:.12rem .55rem;border:1px solid var(--faint);border-radius:3px;background:var(--paper);color:var(--ink);font:.8125rem Helvetica,Arial,sans-serif;cursor:pointer}
.tablebox{position:relative;overflow:auto;max-height:34rem;margin:.8rem 0;background:var(--paper);border:1px solid var(--line);border-radius:4px}
table{border-collapse:collapse;width:100%;font:.8438rem/1.4 Helvetica,Arial,sans-serif;font-variant-numeric:tabular-nums}
caption{position:absolute;width:1px;height:1px;overflow:hidden;clip-path:inset(50%)}
thead th{position:sticky;top:0;background:var(--paper);border-bottom:1.5px solid var(--ink);vertical-align:bottom;z-index:1}
th,td{padding:.34rem .7rem;text-align:left;vertical-align:top}
thead th,tbody th,.num{white-space:nowrap}
tbody th{font-weight:400}
tbody tr+tr>*{border-top:1px solid var(--line)}
.num{text-align:right}
.long{min-width:17rem}
th button{all:unset;cursor:pointer;font-weight:700}
th button:focus-visible{outline:3px solid var(--link);outline-offset:2px}
th[aria-sort=ascending] button::after{content:" ↑"}
th[aria-sort=descending] button::after{content:" ↓"}
.find{margin:.6rem 0 0;font:.875rem Helvetica,Arial,sans-serif;color:var(--soft)}
.find input{padding:.3rem .5rem;border:1px solid var(--faint);border-radius:3px;background:var(--paper);color:var(--ink);font:inherit;width:14rem;max-width:100%}
.verdict{white-space:nowrap}
.verdict.bad{color:var(--alarm);font-weight:700}
.note,.size,.lead .note{color:var(--soft);font-size:.875rem;line-height:1.5;font-weight:400}
ul.note{padding-left:1.1rem}
details{border-top:1px solid var(--line);padding:.2rem 0}
details:last-of-type{border-bottom:1px solid var(--line)}
summary{cursor:pointer;padding:.5rem 0;font:700 .9375rem/1.3 Helvetica,Arial,sans-serif}
.settings{display:grid;grid-template-columns:repeat(auto-fill,minmax(15rem,1fr));gap:.1rem 1.5rem;max-width:none;font:.875rem/1.5 Helvetica,Arial,sans-serif}
.settings div{display:flex;gap:.6rem;justify-content:space-between;border-bottom:1px dotted var(--line)}
.settings dt{color:var(--soft)}
.settings dd{margin:0;text-align:right}
.inputs code{overflow-wrap:anywhere;font-size:.8125rem}
.sources{font-size:.9375rem}
#reader{position:fixed;left:50%;bottom:1rem;transform:translateX(-50%);width:max-content;max-width:min(56rem,calc(100vw - 2rem));padding:.55rem 1rem;background:var(--ink);color:var(--paper);border-radius:6px;font:.875rem/1.4 Helvetica,Arial,sans-serif;z-index:5;overflow-wrap:anywhere;box-shadow:0 3px 14px #0004}
#reader[hidden]{display:none}
.fig.fk,.fig .fk{fill:var(--ink)}.fig .sk{stroke:var(--ink)}.fig .fm{fill:var(--soft)}.fig .sm{stroke:var(--soft)}.fig .fn{fill:var(--faint)}.fig .sn{stroke:var(--faint)}.fig .fp,.fig .paper{fill:var(--paper)}.fig .sp{stroke:var(--paper)}.fig .fa{fill:var(--alarm)}.fig .sa{stroke:var(--alarm)}
.fig text{white-space:pre}
.js .fig [data-b],.js .fig [data-z],.js .fig [data-s]{cursor:pointer}
.lit .fig [data-b]:not(.on),.lit .fig .tie:not(.on),.lit .fig [data-s]:not(.on){opacity:.22}
.fig circle.on,.fig path.on[data-s],.fig line.on,.fig rect.on[data-b]{stroke:var(--ink);stroke-width:2.2}
.fig path.rim.on{stroke-width:11}
.fig text.on{font-weight:700}
.fig g.on .edge{stroke-width:2.8}
.fig .tie.on{stroke:var(--ink);stroke-width:1.6;stroke-opacity:1}
.fig circle.star,.fig path.star{stroke:var(--ink);stroke-width:3.2}
.off{opacity:.1}
tr.off,li.off,tr.unfound,figure.off{display:none}
tr.on>*{background:var(--mark)}
tr.on>:first-child{box-shadow:inset 4px 0 0 var(--ink)}
a.on{background:var(--mark)}
td a[data-b],th a[data-b]{white-space:nowrap}
.odd{list-style:none;padding:0;max-width:64rem;margin:.4rem 0 1rem;border-top:1px solid var(--line)}
.odd li{padding:.55rem .8rem .6rem;border-bottom:1px solid var(--line)}
.odd li.on{background:var(--mark);box-shadow:inset 4px 0 0 var(--ink)}
.odd p{margin:0;max-width:none}
.odd .what{font:.9375rem/1.5 Helvetica,Arial,sans-serif}
.odd .why{color:var(--soft);font-size:.9375rem;line-height:1.5;max-width:56rem}
.odd .why li{padding:0;border:0}
.odd ul.why{margin:.2rem 0 0;padding-left:1.1rem;list-style:disc}
.slim{max-width:44rem}
.figures{display:flex;flex-wrap:wrap;gap:0 2.2rem;align-items:flex-start}
.figures figure{flex:1 1 22rem;min-width:0}
.figures figure.wide{flex-basis:100%}
@media (max-width:62rem){
.layout{display:block}
.side{position:static;max-height:none;padding-bottom:0;border-bottom:1px solid var(--line)}
.toc{columns:2;column-gap:1rem}
.hint{padding-bottom:.8rem}
}
@media (max-width:46rem){
.wide figcaption::before{content:"The drawing scrolls sideways. "}
}
@media (max-width:40rem){
.lead p{font-size:1.06rem}
.figbox{padding:.5rem;margin-left:-.4rem;margin-right:-.4rem}
}
@media print{
.wide figcaption::before{content:none!important}
@page{size:A4;margin:15mm}
:root{--ink:#000;--soft:#333;--faint:#777;--grid:#ddd;--paper:#fff;--page:#fff;--alarm:#000;--link:#000;--line:#999}
html{color-scheme:light}
body{background:#fff;font-size:10pt}
.side,#reader,.save,.find,.skip{display:none!important}
.top{padding:0 0 3mm}
.layout{display:block;padding:0;max-width:none}
section{padding-top:6mm}
h2,h3{break-after:avoid}
figure{break-inside:avoid;max-width:none;margin-bottom:6mm}
figure.narrow{max-width:100mm}
.figbox{overflow:visible;border:0;padding:0}
.figbox svg{min-width:0!important;max-height:203mm}
.tablebox{overflow:visible;max-height:none;border:0;margin:2mm 0}
table{font-size:7pt}
th,td{padding:.6mm 1mm}
thead th,tbody th,td a[data-b],th a[data-b]{white-space:normal}
tbody th:has(a),td:has(a[data-b]){min-width:23mm}
td .chip,th .chip{font-size:6.5pt}
.odd li{break-inside:avoid}
details:not([open]),details>summary::marker{display:none;content:""}
.long{min-width:30mm}
thead th{position:static}
tr{break-inside:avoid}
.chip{print-color-adjust:exact;-webkit-print-color-adjust:exact}
svg{print-color-adjust:exact;-webkit-print-color-adjust:exact}
.lead p{font-size:11pt}
a{text-decoration:none}
}
`;
