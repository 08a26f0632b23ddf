import type { OpenApiDocument, Operation, ParameterObject, ResponseObject } from './document';

/** The API's description as one page that needs no script and nothing from elsewhere. */
export function docsPage(document: OpenApiDocument): string {
  const operations = Object.entries(document.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({ path, method, operation })),
  );
  const sections = document.tags.map(({ name }) => {
    const own = operations.filter(({ operation }) => operation.tags.includes(name));
    const details = own.map(({ path, method, operation }) => operationPart(method, path, operation)).join('\n');
    return `<section aria-labelledby="tag-${name}"><h2 id="tag-${name}">${escape(name)}</h2>\n${details}</section>`;
  });
  const schemas = Object.entries(document.components['schemas'] ?? {}).map(
    ([name, schema]) => `<details id="schema-${name}"><summary>${escape(name)}</summary>${jsonPart(schema)}</details>`,
  );
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>The API of Fettle</title>
<link rel="icon" type="image/svg+xml" href="/favicon.svg">
<link rel="stylesheet" href="/api/docs/style.css">
</head>
<body>
<header><h1>The API of Fettle</h1><p>${escape(document.info.description).replace(/`([^`]+)`/g, '<code>$1</code>')}</p>
<p><a href="/api/openapi.json">The same as an OpenAPI 3.1 document</a></p></header>
<nav aria-label="Parts"><ul>${document.tags.map(({ name }) => `<li><a href="#tag-${name}">${escape(name)}</a></li>`).join('')}<li><a href="#schemas">shapes</a></li></ul></nav>
<main>
${sections.join('\n')}
<section aria-labelledby="schemas"><h2 id="schemas">shapes</h2>
${schemas.join('\n')}</section>
</main>
</body>
</html>
`;
}

function operationPart(method: string, path: string, operation: Operation): string {
  const { operationId, summary, description, parameters = [], requestBody, responses } = operation;
  const body = requestBody ? `<h3>Body</h3>${contentPart(requestBody.content)}` : '';
  const given = parameters.length === 0 ? '' : `<h3>Parameters</h3><ul>${parameters.map(parameterPart).join('')}</ul>`;
  const answers = Object.entries(responses).flatMap(([status, response]) =>
    'description' in response ? [answerPart(status, response)] : [],
  );
  return `<details id="${operationId}"><summary><code class="method">${method.toUpperCase()}</code> <code>${escape(path)}</code> <span>${escape(summary)}</span></summary>
<p>${escape(description)}</p>${given}${body}<h3>Answers</h3>${answers.join('')}</details>`;
}

function parameterPart({ name, in: place, required, description, schema }: ParameterObject): string {
  const note = description === undefined ? '' : `: ${escape(description)}`;
  return `<li><code>${escape(name)}</code> (${place}, ${required ? 'required' : 'optional'})${note}${jsonPart(schema)}</li>`;
}

function answerPart(status: string, { description, content }: ResponseObject): string {
  return `<p><strong>${status}</strong> ${escape(description)}</p>${content ? contentPart(content) : ''}`;
}

function contentPart(content: NonNullable<ResponseObject['content']>): string {
  return Object.entries(content)
    .map(([type, { schema }]) => `<p><code>${escape(type)}</code></p>${jsonPart(schema)}`)
    .join('');
}

/** JSON, with references made into links. */
function jsonPart(json: unknown): string {
  const text = escape(JSON.stringify(json, null, 2)).replace(
    /&quot;#\/components\/schemas\/(\w+)&quot;/g,
    '<a href="#schema-$1">$1</a>',
  );
  return `<pre tabindex="0">${text}</pre>`;
}

function escape(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

/** The page's look, in the studio's own colours, light and dark. */
export const DOCS_STYLE = `:root {
  color-scheme: light dark;
  --plaster: light-dark(#f6f2ea, #1c1b19);
  --gesso: light-dark(#ffffff, #262421);
  --ink: light-dark(#22201c, #efeae0);
  --graphite: light-dark(#6b655b, #a8a093);
  --silicone: light-dark(#3f5f8a, #94b4e0);
}
body { margin: 0 auto; max-width: 72rem; padding: 1rem; background: var(--plaster); color: var(--ink); font: 1rem/1.5 'Work Sans', sans-serif; }
a { color: var(--silicone); }
nav ul { display: flex; flex-wrap: wrap; gap: 0.25rem 1rem; padding: 0; list-style: none; }
details { margin: 0.5rem 0; padding: 0.5rem 0.75rem; background: var(--gesso); border-radius: 0.375rem; }
summary { cursor: pointer; overflow-wrap: anywhere; }
summary span { color: var(--graphite); }
.method { font-weight: 700; }
h3 { margin: 0.75rem 0 0.25rem; font-size: 1rem; }
pre { overflow-x: auto; max-height: 24rem; padding: 0.5rem; background: var(--plaster); font-size: 0.875rem; }
`;
