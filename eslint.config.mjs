import js from '@eslint/js';
import jsdoc from 'eslint-plugin-jsdoc';
import tseslint from 'typescript-eslint';

/** Parts of the product that people outside a file rely on are documented; sizes are held to what one can read. */
const house = {
  'max-lines': ['error', { max: 250, skipBlankLines: false, skipComments: false }],
  'max-lines-per-function': ['error', { max: 50, skipBlankLines: true, skipComments: true }],
  'max-len': ['error', { code: 140, ignoreStrings: true, ignoreTemplateLiterals: true, ignoreComments: false }],
  'jsdoc/require-jsdoc': [
    'error',
    {
      publicOnly: true,
      require: { ClassDeclaration: true, FunctionDeclaration: true, MethodDefinition: false },
      contexts: ['TSInterfaceDeclaration'],
      checkConstructors: false,
    },
  ],
};

export default tseslint.config(
  { ignores: ['dist/', 'node_modules/', 'coverage/'] },
  js.configs.recommended,
  {
    files: ['src/**/*.ts', 'test/**/*.ts', 'bench/**/*.ts', 'manifest/**/*.ts'],
    extends: [tseslint.configs.strictTypeChecked, tseslint.configs.stylisticTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    plugins: { jsdoc },
    rules: {
      '@typescript-eslint/no-non-null-assertion': 'off',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true, allowNullish: true }],
      '@typescript-eslint/explicit-function-return-type': ['error', { allowExpressions: true }],
      // Places of an array are typed as filled; this rule would forbid asking whether they are.
      '@typescript-eslint/no-unnecessary-condition': 'off',
      '@typescript-eslint/prefer-for-of': 'off',
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportDefaultDeclaration', message: 'Export by name, so that a thing has one name everywhere.' },
        { selector: "MemberExpression[property.name='innerHTML']", message: 'Names come from cells: use textContent or a template.' },
      ],
    },
  },
  { files: ['src/**/*.ts'], rules: house },
  {
    files: ['src/flow/**/*.ts', 'src/cover/**/*.ts', 'src/exact/**/*.ts'],
    rules: { 'no-restricted-globals': ['error', { name: 'document', message: 'The core knows no page.' }] },
  },
  {
    files: ['test/**/*.ts', 'bench/**/*.ts'],
    rules: { '@typescript-eslint/explicit-function-return-type': 'off', '@typescript-eslint/no-unsafe-assignment': 'off' },
  },
  { files: ['vitest.config.ts'], extends: [tseslint.configs.recommended], rules: { 'no-restricted-syntax': 'off' } },
  {
    files: ['**/*.mjs', '**/*.cjs'],
    languageOptions: {
      globals: Object.fromEntries(
        ['process', 'console', 'URL', 'module', 'setTimeout', 'performance', 'Buffer', 'document', 'window', 'requestAnimationFrame'].map((name) => [name, 'readonly']),
      ),
    },
  },
);
