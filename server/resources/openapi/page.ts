import type { OpenApiDocument } from './document';

const METHODS = ['get', 'post', 'put', 'patch', 'delete'] as const;

const STYLE = `
  body { font: 16px/1.5 system-ui, sans-serif; max-width: 60rem; margin: 2rem auto; padding: 0 1rem; color: #1f2a2e; background: #fff }
  code, pre { font: 14px/1.45 ui-monospace, monospace } pre { overflow-x: auto; background: #f3f5f4; padding: .75rem }
  h2 { margin-top: 2.5rem; text-transform: capitalize } article { border-top: 1px solid #cfd6d4; padding: .75rem 0 }
  h3 { margin: 0; font-size: 1rem } p { margin: .25rem 0 } summary { cursor: pointer } nav a { margin-right: 1rem; text-transform: capitalize }
  @media (prefers-color-scheme: dark) { body { color: #e4e9e7; background: #161b1d } pre { background: #20282b } a { color: #8cc7e8 } }`;

/** The same document for a person to read: plain HTML, nothing loaded from anywhere. */
export function renderPage(document: OpenApiDocument): string {
  const entries = Object.entries(document.paths ?? {}).flatMap(([path, item]) =>
    METHODS.flatMap((method) => (item[method] ? [{ path, method, operation: item[method] }] : [])),
  );
  const tags = [...new Set(entries.flatMap(({ operation }) => operation.tags ?? []))].sort();
  const sections = tags.map((tag) => {
    const articles = entries.filter(({ operation }) => operation.tags?.includes(tag)).map(renderOperation);
    return `<section><h2 id="${escape(tag)}">${escape(tag)}</h2>${articles.join('')}</section>`;
  });
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>Witness Mark: API</title><style>${STYLE}</style></head>
<body><main><h1>Witness Mark: API</h1>
<p>${escape(document.info.description ?? '')}</p>
<p>Addresses are below <code>/api/v1</code>. Programs send <code>Authorization: Bearer KEY</code>. The same as
<a href="/api/v1/openapi.json">OpenAPI 3.1</a>.</p>
<nav aria-label="Parts">${tags.map((tag) => `<a href="#${escape(tag)}">${escape(tag)}</a>`).join('')}</nav>
${sections.join('')}</main></body></html>`;
}

type Entry = {
  path: string;
  method: string;
  operation: {
    summary?: string;
    description?: string;
    parameters?: unknown;
    requestBody?: unknown;
    responses?: object;
  };
};

function renderOperation({ path, method, operation }: Entry): string {
  const answers = Object.entries(operation.responses ?? {}).filter(([status]) => status !== 'default');
  const details = [
    ...(operation.parameters ? [detail('Parameters', operation.parameters)] : []),
    ...(operation.requestBody ? [detail('Body', operation.requestBody)] : []),
    ...answers.map(([status, answer]) => detail(`Answer ${status}`, answer)),
  ];
  return `<article><h3><code>${method.toUpperCase()} ${escape(path)}</code></h3>
<p>${escape(operation.summary ?? '')}. ${escape(operation.description ?? '')}</p>${details.join('')}</article>`;
}

const detail = (title: string, content: unknown) =>
  `<details><summary>${title}</summary><pre tabindex="0">${escape(JSON.stringify(content, null, 2))}</pre></details>`;

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escape = (text: string) => text.replace(/[&<>"]/g, (character) => ENTITIES[character] ?? character);
