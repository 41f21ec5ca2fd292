import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { makeXml } from '../../manifest/xml';

it('the version is one that Office takes: 1.0 or later, in four parts', () => {
  const file = readFileSync(join(import.meta.dirname, '../../package.json'), 'utf8');
  const { version } = JSON.parse(file) as { version: string };
  const [, written] = /<Version>(.*)<\/Version>/u.exec(makeXml({ origin: 'https://duty.example', version }))!;
  expect(written).toMatch(/^[1-9]\d{0,4}(\.\d{1,5}){3}$/u);
});
