import type { ApiDescription, Operation } from './describe-api.ts';
import { schemaOutline } from './schema-outline.ts';

const escapes: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: unknown) => String(text).replace(/[&<>"]/g, (c) => escapes[c]);
const anchor = (text: string) => text.toLowerCase().replace(/\W+/g, '-');

/** The description as one page of HTML without a script, so that it needs nothing but itself. */
export function apiPage(description: ApiDescription): string {
  const operations = Object.entries(description.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({ path, method: method.toUpperCase(), operation })),
  );
  const sections = description.tags.map(({ name }) => {
    const own = operations.filter(({ operation }) => operation.tags.includes(name));
    return `<section id="${anchor(name)}"><h2>${escaped(name)}</h2>${own
      .map(({ path, method, operation }) => describeOperation(path, method, operation))
      .join('')}</section>`;
  });
  const named = Object.entries(description.components.schemas).map(
    ([name, schema]) =>
      `<details id="schema-${escaped(name)}"><summary><code>${escaped(name)}</code></summary>${outline(schema)}</details>`,
  );
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>${escaped(description.info.title)}</title><style>${style}</style></head><body><main>
<h1>${escaped(description.info.title)} <small>${escaped(description.info.version)}</small></h1>
<p>${escaped(description.info.summary)}. The same for programs: <a href="/api/openapi.json">openapi.json</a>.</p>
<p>Bodies and replies are JSON unless said. What is refused comes as <a href="#schema-Problem">a problem</a> (RFC 9457):
what was found, what was expected, how to mend it.</p>
<nav aria-label="Headings"><ul>${description.tags
    .map(({ name }) => `<li><a href="#${anchor(name)}">${escaped(name)}</a></li>`)
    .join('')}<li><a href="#schemas">Schemas</a></li></ul></nav>
${sections.join('\n')}
<section id="schemas"><h2>Schemas</h2>${named.join('\n')}</section>
</main></body></html>
`;
}

const outline = (schema: unknown) =>
  `<pre tabindex="0">${escaped(schemaOutline(schema)).replace(
    /→ ([\w.]+)/g,
    '→ <a href="#schema-$1">$1</a>',
  )}</pre>`;

function describeOperation(path: string, method: string, operation: Operation): string {
  const { summary, description, parameters, requestBody, responses, operationId } = operation;
  const rows = parameters.map(
    ({ name, in: place, required, schema }) =>
      `<tr><td><code>${escaped(name)}</code></td><td>${escaped(place)}${required ? '' : ', may be left out'}</td><td><code>${escaped(schemaOutline(schema))}</code></td></tr>`,
  );
  const bodies = Object.entries(requestBody?.content ?? {}).map(
    ([type, { schema }]) => `<h4>Body: ${escaped(type)}</h4>${schema ? outline(schema) : ''}`,
  );
  const replies = Object.entries(responses).map(([status, { description: said, content = {} }]) => {
    const shown = Object.entries(content).filter(([type]) => type !== 'application/problem+json');
    return `<h4>${status === 'default' ? 'Otherwise' : status}: ${escaped(said)}</h4>${shown
      .map(([type, { schema }]) => `<p>${escaped(type)}</p>${schema ? outline(schema) : ''}`)
      .join('')}`;
  });
  return `<details id="${escaped(operationId)}"><summary><code><b>${method}</b> ${escaped(path)}</code>
<span>${escaped(summary)}</span></summary><p>${escaped(description)}</p>${
    rows.length > 0
      ? `<table><thead><tr><th>Parameter</th><th>Where</th><th>What</th></tr></thead><tbody>${rows.join('')}</tbody></table>`
      : ''
  }${bodies.join('')}${replies.join('')}</details>`;
}

const style = `
:root { color-scheme: light dark; --line: light-dark(#c4cac7, #3c4845); --link: light-dark(#1f5c57, #8fc7bf); }
body { margin: 0; font: 16px/1.5 'Atkinson Hyperlegible Next', system-ui, sans-serif;
  background: light-dark(#eef0ee, #141b1a); color: light-dark(#16211f, #dfe6e3); }
main { max-width: 60rem; margin: 0 auto; padding: 2rem 1rem 4rem; }
h1 { font-size: 1.75rem; } h1 small { font-weight: normal; font-size: 1rem; }
h2 { margin: 2.5rem 0 .5rem; padding-top: .5rem; border-top: 2px solid currentColor; font-size: 1.25rem; }
h4 { margin: 1rem 0 .25rem; font-size: 1rem; }
a { color: var(--link); } :focus-visible { outline: 3px solid var(--link); outline-offset: 2px; }
nav ul { display: flex; flex-wrap: wrap; gap: .25rem 1.25rem; padding: 0; list-style: none; }
details { border-bottom: 1px solid var(--line); padding: .25rem 0; }
details[open] { padding-bottom: 1rem; }
summary { cursor: pointer; padding: .375rem 0; overflow-wrap: anywhere; }
summary span { display: block; }
code, pre { font-family: 'Atkinson Hyperlegible Mono', ui-monospace, monospace; font-size: .875rem; }
pre { overflow-x: auto; padding: .75rem; margin: .25rem 0; border: 1px solid var(--line); }
table { border-collapse: collapse; width: 100%; } th { text-align: left; }
td, th { padding: .25rem .75rem .25rem 0; border-bottom: 1px solid var(--line); vertical-align: top; overflow-wrap: anywhere; }
`;
