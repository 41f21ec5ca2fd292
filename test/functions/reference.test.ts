import { expect, it } from 'vitest';
import { referenceMarkdown } from '../../src/functions/reference';
import { FUNCTIONS } from '../../src/functions/registry';

it('docs/functions.md says what the declarations say', async () => {
  await expect(referenceMarkdown(FUNCTIONS)).toMatchFileSnapshot('../../docs/functions.md');
});
