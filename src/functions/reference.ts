import type { CellFunction } from './declaration';
import { NAMESPACE } from './registry';

/** The call of a function as documentation writes it: optional parameters in brackets. */
function signature({ id, parameters }: CellFunction): string {
  const list = parameters.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(', ');
  return `${NAMESPACE}.${id}(${list})`;
}

/** The reference of all functions, as Markdown. */
export function referenceMarkdown(functions: readonly CellFunction[]): string {
  const sections = functions.map((fn) =>
    [
      `## ${NAMESPACE}.${fn.id}`,
      '',
      fn.summary,
      '',
      '```',
      `=${signature(fn)}`,
      '```',
      '',
      '| parameter | |',
      '| --- | --- |',
      ...fn.parameters.map(({ name, description }) => `| ${name} | ${description} |`),
      '',
      '| column | |',
      '| --- | --- |',
      ...fn.columns.map(({ name, description }) => `| ${name} | ${description} |`),
      '',
      `Example: \`${fn.example}\``,
    ].join('\n'),
  );
  const head = '# The functions\n\nWritten from their declarations by `npm run reference`.';
  return `${[head, ...sections].join('\n\n')}\n`;
}

/** The same as a page, for the help links of the add-in. */
export function referencePage(functions: readonly CellFunction[]): string {
  const table = (head: string, rows: readonly { name: string; description: string }[]): string =>
    `<table><thead><tr><th>${head}</th><th>meaning</th></tr></thead><tbody>${rows
      .map(({ name, description }) => `<tr><th scope="row">${escape(name)}</th><td>${escape(description)}</td></tr>`)
      .join('')}</tbody></table>`;
  const sections = functions.map(
    (fn) =>
      `<section id="${fn.id.toLowerCase()}"><h2>${NAMESPACE}.${fn.id}</h2><p>${escape(fn.summary)}</p>` +
      `<pre>=${escape(signature(fn))}</pre>${table('parameter', fn.parameters)}${table('column', fn.columns)}` +
      `<p>Example: <code>${escape(fn.example)}</code></p></section>`,
  );
  return `<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Dutyproof: the functions</title>
<style>
body { max-width: 46em; margin: 2em auto; padding: 0 1em; font: 16px/1.5 system-ui, sans-serif; color: #23282b; background: #fbfaf7; }
table { border-collapse: collapse; margin: 1em 0; } th, td { padding: 4px 10px; border: 1px solid #d9d5cb; text-align: left; vertical-align: top; font-weight: 400; }
pre { padding: 8px 10px; background: #fff; border: 1px solid #d9d5cb; overflow: auto; }
</style>
</head>
<body>
<h1>Dutyproof: the functions</h1>
${sections.join('\n')}
<section id="privacy"><h2>Privacy</h2><p>Everything is computed inside the workbook. Nothing is sent anywhere.</p></section>
<section id="licence"><h2>Licence</h2><p>Dutyproof is free software under the MIT licence, without warranty. A plan is a proposal: local rules on rest, qualification, safeguarding and working time, and the person who signs, come first.</p></section>
</body>
</html>
`;
}

function escape(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
