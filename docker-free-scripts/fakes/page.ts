/** The frame of the pages that a person opens, and escaping. No scripts: every page works with them off. */
import type { Answer } from './http';

/** HTML that is known to be safe; everything else goes through escape(). */
export type Html = { html: string };

export const raw = (html: string): Html => ({ html });

/** A template in which every inserted value is escaped unless it is Html (or a list of it) already. */
export function markup(parts: TemplateStringsArray, ...values: (string | number | Html | readonly Html[])[]): Html {
  return raw(parts.reduce((done, part, at) => done + shown(values[at - 1] ?? '') + part));
}

function shown(value: string | number | Html | readonly Html[]): string {
  if (typeof value === 'string' || typeof value === 'number') return escape(String(value));
  return 'html' in value ? value.html : value.map((each) => each.html).join('');
}

export const escape = (text: string): string =>
  text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);

/** A whole page. `formTargets` are origins that a form's answer may lead to, since browsers check redirects too. */
export function page(
  title: string,
  content: Html,
  options: { status?: number; formTargets?: string[]; frames?: boolean } = {},
): Answer {
  const html = markup`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${title} · local stand-in</title>
<link rel="stylesheet" href="/style.css">
<link rel="icon" href="data:,">
</head>
<body>
<header>
<p class="notice"><strong>Local stand-in.</strong> No money moves, no mail leaves this computer.</p>
<nav aria-label="Stand-ins"><a href="/">Overview</a> <a href="/payments">Payments</a> <a href="/mail">Mail</a> <a href="/files">Files</a></nav>
</header>
<main>
<h1>${title}</h1>
${content}
</main>
</body>
</html>
`.html;
  const policy = [
    "default-src 'none'",
    "style-src 'self'",
    'img-src data:',
    `form-action 'self' ${(options.formTargets ?? []).join(' ')}`,
    "base-uri 'none'",
    "frame-ancestors 'none'",
    options.frames ? "frame-src 'self'" : "frame-src 'none'",
  ];
  return {
    status: options.status ?? 200,
    headers: { 'content-type': 'text/html; charset=utf-8', 'content-security-policy': policy.join('; ') },
    body: html,
  };
}

/** A table with a caption; empty ones say so. */
export function table(
  caption: string,
  headings: readonly string[],
  rows: readonly (readonly (string | Html)[])[],
  empty: string,
): Html {
  if (rows.length === 0) return markup`<h2>${caption}</h2><p>${empty}</p>`;
  return markup`<h2 id="${idOf(caption)}">${caption}</h2>
<div class="wide" role="region" tabindex="0" aria-labelledby="${idOf(caption)}"><table aria-labelledby="${idOf(caption)}">
<thead><tr>${headings.map((heading) => markup`<th scope="col">${heading}</th>`)}</tr></thead>
<tbody>${rows.map((row) => markup`<tr>${row.map((cell) => markup`<td>${cell}</td>`)}</tr>`)}</tbody>
</table></div>`;
}

const idOf = (caption: string): string => caption.toLowerCase().replace(/[^a-z]+/g, '-');

export const moment = (ms: number): string => `${new Date(ms).toISOString().slice(0, 19).replace('T', ' ')} UTC`;

export const STYLE = `
:root { color-scheme: light dark; --ground: #f3f0ea; --ink: #22211f; --soft: #5c5850; --rule: #cfc7b8; --act: #8f3f1c; --stop: #96261d; --on-act: #fff; }
@media (prefers-color-scheme: dark) { :root { --ground: #1c1b19; --ink: #ece5d8; --soft: #b5ab9b; --rule: #45403a; --act: #e8a27a; --stop: #f3a093; --on-act: #1c1b19; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--ground); color: var(--ink); font: 16px/1.5 "Atkinson Hyperlegible Next", system-ui, sans-serif; }
header, main { max-width: 68rem; margin: 0 auto; padding: 0 1.25rem; }
header { border-bottom: 2px solid var(--ink); display: flex; flex-wrap: wrap; gap: .25rem 2rem; justify-content: space-between; align-items: baseline; }
.notice { margin: .75rem 0; }
nav a { margin-right: 1rem; }
a { color: var(--act); }
h1 { font-size: 1.6rem; line-height: 1.25; margin: 1.75rem 0 1rem; overflow-wrap: anywhere; }
h2 { font-size: 1.1rem; margin: 2rem 0 .5rem; }
.wide { overflow-x: auto; }
table { border-collapse: collapse; width: 100%; font-variant-numeric: tabular-nums; }
th, td { text-align: left; vertical-align: top; padding: .4rem .75rem .4rem 0; border-bottom: 1px solid var(--rule); overflow-wrap: break-word; }
th { border-bottom-color: var(--ink); font-weight: 600; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .25rem 1.25rem; }
dt { color: var(--soft); } dd { margin: 0; overflow-wrap: anywhere; }
code, pre { font-family: "Atkinson Hyperlegible Mono", ui-monospace, monospace; }
pre { white-space: pre-wrap; overflow-wrap: anywhere; border-left: 2px solid var(--rule); padding-left: 1rem; }
iframe { width: 100%; height: 32rem; border: 1px solid var(--rule); background: #fff; }
form.card { max-width: 26rem; display: grid; gap: 1rem; }
label { display: block; font-weight: 600; margin-bottom: .25rem; }
input { width: 100%; min-height: 2.75rem; padding: .5rem .6rem; font: inherit; color: inherit; background: transparent; border: 1px solid var(--soft); border-radius: 0; }
.pair { display: grid; grid-template-columns: 1fr 1fr; gap: 1rem; }
button { min-height: 2.9rem; font: inherit; font-weight: 600; border: 0; background: var(--act); color: var(--on-act); cursor: pointer; }
:focus-visible { outline: 3px solid var(--act); outline-offset: 2px; }
.error { color: var(--stop); font-weight: 600; border-left: 4px solid var(--stop); padding-left: .75rem; }
.sum { font-size: 1.3rem; }
`;
