import { expect, it } from 'vitest';
import { proofMarkdown, referenceMarkdown } from '../../src/functions/reference';
import { FUNCTIONS } from '../../src/functions/registry';

it('docs/functions.md says what the declarations say', async () => {
  await expect(referenceMarkdown(FUNCTIONS)).toMatchFileSnapshot('../../docs/functions.md');
});

it('docs/proof.md says the formulas that are tested', async () => {
  await expect(proofMarkdown()).toMatchFileSnapshot('../../docs/proof.md');
});
