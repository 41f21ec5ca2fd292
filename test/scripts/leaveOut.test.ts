import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import ts from 'typescript';
import { describe, expect, it } from 'vitest';
import leaveOut from '../../scripts/leaveOut.mjs';
import { FUNCTIONS } from '../../src/functions/registry';

const FOLDER = join(import.meta.dirname, '../../src/functions');

/** Every text in a source, and whether it is a description. */
function texts(source: string): { text: string; isDescription: boolean }[] {
  const found: { text: string; isDescription: boolean }[] = [];
  const file = ts.createSourceFile('x.ts', source, ts.ScriptTarget.ES2022, true);
  const visit = (node: ts.Node): void => {
    if (ts.isStringLiteral(node)) {
      found.push({ text: node.text, isDescription: ts.isPropertyAssignment(node.parent) && node.parent.name.getText() === 'description' });
    }
    ts.forEachChild(node, visit);
  };
  visit(file);
  return found;
}

describe('what the page in Excel leaves out', () => {
  it('is every description and nothing else', () => {
    let left = 0;
    for (const name of readdirSync(FOLDER)) {
      const source = readFileSync(join(FOLDER, name), 'utf8');
      const [before, after] = [texts(source), texts(leaveOut(source))];
      expect(after.map(({ text }) => text)).toEqual(before.map(({ text, isDescription }) => (isDescription ? '' : text)));
      left += before.filter(({ isDescription }) => isDescription).length;
    }
    expect(left).toBeGreaterThan(FUNCTIONS.length);
  });
});
