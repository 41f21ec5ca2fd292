import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { expect, it } from 'vitest';
import type { CellFunction } from '../../src/functions/declaration';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { provideSearcher } from '../../src/functions/searches';
import type { Range } from '../../src/sheet/range';
import { hardRanges, hardSpecs } from '../helpers/hardSpec';
import { TestSearcher } from '../helpers/searcher';
import { rangesOf, specs } from '../helpers/spec';

const GOLDEN = join(import.meta.dirname, '../sheet/golden');

/** Sentences by shape: names and numbers are one shape, whichever they are; the shortest example is kept. */
class Sentences {
  readonly #examples = new Map<string, string>();

  add(text: string): void {
    const shape = text
      .replace(/"[^"]*"/gu, '"…"')
      .replace(/(?:Duty|Person) \d/gu, '…')
      .replace(/(?:Mon|Tue|Wed)(?: [ap]m)?/gu, '…')
      .replace(/(?:the limit on|the same time: …|a Clash rule: …)/gu, 'LIMIT')
      .replace(/…(?:(?:, | and |; )…)*/gu, '…')
      .replace(/\d+(?:\.\d+)?/gu, (number) => (number === '1' ? '1' : 'N'));
    const known = this.#examples.get(shape);
    if (known === undefined || text.length < known.length || (text.length === known.length && text < known)) this.#examples.set(shape, text);
  }

  lines(): string[] {
    return [...this.#examples.values()].sort().map((text) => `- ${text.replaceAll('\n', ' ').replaceAll('<', '\\<')}`);
  }
}

const isName = /^(?:(?:Duty|Person) \d(?:; )?)*$/u;

/** Everything the functions say about random cases, flows and others, by function. */
async function spoken(): Promise<Map<string, Sentences>> {
  provideSearcher(new TestSearcher());
  const of = new Map<string, Sentences>(FUNCTIONS.map(({ id }) => [id, new Sentences()]));
  const flows = fc.sample(specs({ aims: true, rules: 8 }), { seed: 7, numRuns: 3_000 }).map(rangesOf);
  const others = fc.sample(hardSpecs(), { seed: 7, numRuns: 400 }).map(hardRanges);
  for (const ranges of [...flows, ...others]) {
    for (const fn of FUNCTIONS) {
      if (fn.id === 'PAIRS' || fn.id === 'FINDINGS' || fn.id === 'GRID' || (fn.id === 'PROOF' && flows.includes(ranges))) continue;
      const own = fn.id === 'CHECK' ? [ranges[4] ?? [], ...ranges.slice(0, 4)] : ranges;
      for (const cell of await said(fn, own)) {
        if (typeof cell === 'string' && cell.includes(' ') && !isName.test(cell)) of.get(fn.id)!.add(cell);
      }
    }
  }
  return of;
}

async function said(fn: CellFunction, ranges: readonly (Range | null)[]): Promise<readonly unknown[]> {
  for (const journal = new Journal(); ; ) {
    const answer = invoke(fn, ranges, 'A!A1', journal);
    if (answer.kind === 'spill') return fn.id === 'PROOF' ? [] : answer.spill.slice(1).flat();
    if (answer.kind === 'fault') return [answer.message];
    await answer.settled;
  }
}

/** Everything that is said of input that cannot be read, and of what is odd in it. */
function read(): { faults: Sentences; findings: Sentences } {
  const [faults, findings] = [new Sentences(), new Sentences()];
  for (const file of readdirSync(GOLDEN)) {
    const entry = JSON.parse(readFileSync(join(GOLDEN, file), 'utf8')) as { faults: string[]; findings: [string, number | null, string, string][] };
    entry.faults.forEach((fault) => faults.add(fault));
    entry.findings.forEach(([, , finding, detail]) => findings.add(`${finding}: ${detail}`));
  }
  return { faults, findings };
}

/** Answers where there is nothing to list. */
function empty(): string[] {
  const nothing: Range = [['Duty', 'Person']];
  const lines = FUNCTIONS.map((fn) => {
    const answer = invoke(fn, fn.id === 'PAIRS' ? [[]] : fn.id === 'CHECK' ? [nothing, nothing, [[1]]] : [nothing, [[1]]], 'A!A1', new Journal());
    return `- ${fn.id}: ${answer.kind === 'spill' ? String(answer.spill[1]?.[0]) : answer.kind === 'fault' ? answer.message : ''}`;
  });
  return lines.filter((line) => line.includes(' ', line.indexOf(':') + 2));
}

it('docs/sentences.md holds every sentence the functions say, an example each', { timeout: 120_000 }, async () => {
  const { faults, findings } = read();
  const sections = [...(await spoken())]
    .map(([id, sentences]) => [id, sentences.lines()] as const)
    .filter(([, lines]) => lines.length > 0)
    .map(([id, lines]) => `## DUTY.${id}\n\n${lines.join('\n')}`);
  const text = [
    '# Every sentence\n\nCollected from thousands of random cases and from every test of bad input, one example of each. Written by `npm run reference`.',
    ...sections,
    `## Where there is nothing to list\n\n${empty().join('\n')}`,
    `## DUTY.FINDINGS\n\n${findings.lines().join('\n')}`,
    `## Input that cannot be read\n\n${faults.lines().join('\n')}`,
  ].join('\n\n');
  await expect(`${text}\n`).toMatchFileSnapshot('../../docs/sentences.md');
});
