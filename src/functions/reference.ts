import type { CellFunction } from './declaration';
import { PROOF_CHECKS, PROOF_NAMES } from './proofChecks';
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

const PROOF_HEAD = `# Checking a plan without Dutyproof

Written from the formulas themselves by \`npm run reference\`.

\`DUTY.PROOF\` spills a table: the plan seat by seat with every count it must keep, then bounds that together allow no more seats than the plan covers. The formulas below check both parts against the input tables. They use nothing but COUNTIFS, SUMIFS, SUMPRODUCT, ABS and SUM, so they work in any spreadsheet program, on a copy with plain values too. Each counts faults: all of them 0 means that the plan keeps every limit and that no plan covers more.

Why the bounds are a proof: every pair of a duty and a person falls under a bound (its duty's need, a person's maximum, a slot or group of that person, or the pair itself) or is closed by a rule, so no plan can hold more seats than the bounds allow together. Their sum is the number of seats covered.

Two things are for a reader to look at. Closed pairs (\`no room\`) and bounds below a maximum rest on Fixed seats, which the formulas count. And the formulas compare names as the spreadsheet does, without regard to capitals but with every blank: type a name in one spelling.

A spreadsheet takes some texts for conditions: those that begin with =, < or >, those that hold *, ? or ~, and the words TRUE and FALSE. Where such a text is a name in the tables, formulas count faults that are none; rename it. The other way round nothing is overlooked: such a text in the place of a name is found. The check on the sheets that the pane makes to hand over counts in numbers instead of names, and takes every name for itself.

Bounds that rest on times or Clash rules (their limit begins with \`the same time\` or \`a Clash rule\`) are in no column of the tables: the formulas about slots and groups count them as faults, and they are left for a reader to look at.

The demo workbook has them on its sheet Proof. To use them elsewhere, give these names to the columns, without their headings:

| name | column |
| --- | --- |`;

/** The native formulas that check a proof, as Markdown. */
export function proofMarkdown(): string {
  const names = Object.entries(PROOF_NAMES).flatMap(([table, columns]) =>
    Object.entries(columns).map(([name, heading]) => `| ${name} | ${heading} of ${table === 'proof' ? 'what DUTY.PROOF spilled' : `the ${table} table`} |`),
  );
  const checks = PROOF_CHECKS.map(({ fault, formula }) => `${fault}:\n\n\`\`\`\n${formula}\n\`\`\``);
  return `${PROOF_HEAD}\n${names.join('\n')}\n\n## The formulas\n\n${checks.join('\n\n')}\n`;
}

/** The reference as a page, for the help links of the add-in. */
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
