// Builds dist/: the Excel page, the workbench page, functions.json and both manifests.
import CopyPlugin from 'copy-webpack-plugin';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import HtmlPlugin from 'html-webpack-plugin';
import webpack from 'webpack';
import { loadTypeScript, ROOT } from './scripts/load.mjs';

const { version } = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8'));
const edition = { origin: (process.env.DUTYPROOF_ORIGIN ?? 'https://localhost:3000').replace(/\/+$/, ''), version };
const require = createRequire(import.meta.url);

/** The folder of an installed package. */
function folderOf(name) {
  const file = require.resolve(`${name}/package.json`);
  return dirname(file);
}

/** What the pages are made of besides our own code; the texts of their licences are served with them. */
const LICENSED = ['@odoo/o-spreadsheet', '@odoo/owl', 'bootstrap', 'hucre', 'lit-html', '@noble/hashes', 'papaparse'];

/** Writes what is derived from the declarations of the functions. */
class DerivedFiles {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap('DerivedFiles', (compilation) => {
      const stage = webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL;
      compilation.hooks.processAssets.tapPromise({ name: 'DerivedFiles', stage }, async () => {
        const [{ makeXml }, { makeJson }, { makeFunctionsJson }, { FUNCTIONS }, { referencePage }] = await Promise.all(
          [
            'manifest/xml.ts',
            'manifest/json.ts',
            'manifest/functionsJson.ts',
            'src/functions/registry.ts',
            'src/functions/reference.ts',
          ].map(loadTypeScript),
        );
        const emit = (name, text) => compilation.emitAsset(name, new webpack.sources.RawSource(text));
        emit('manifest.xml', makeXml(edition));
        emit('manifest.json', JSON.stringify(makeJson(FUNCTIONS, edition), null, 2));
        emit('functions.json', JSON.stringify(makeFunctionsJson(FUNCTIONS, edition), null, 2));
        emit('functions.html', referencePage(FUNCTIONS));
      });
    });
  }
}

const common = {
  context: ROOT,
  target: ['web', 'es2022'],
  devtool: false,
  module: { rules: [{ test: /\.ts$/, loader: 'ts-loader', options: { transpileOnly: true, compilerOptions: { noEmit: false } } }] },
  resolve: { extensions: ['.ts', '.js', '.mjs'] },
  performance: { hints: false },
};

const page = (filename, template) => new HtmlPlugin({ filename, template, inject: false, minify: false });

const excel = {
  ...common,
  name: 'excel',
  entry: { pane: './src/entries/excel.ts' },
  output: { path: join(ROOT, 'dist'), filename: '[name].js' },
  plugins: [page('pane.html', 'src/entries/pane.html'), new CopyPlugin({ patterns: [{ from: 'assets/icons', to: 'icons' }] }), new DerivedFiles()],
};

const workbench = {
  ...common,
  name: 'workbench',
  entry: { workbench: './src/entries/workbench.ts' },
  output: { path: join(ROOT, 'dist'), filename: '[name].js' },
  plugins: [
    page('workbench.html', 'src/workbench/workbench.html'),
    new CopyPlugin({
      patterns: [
        { from: 'src/workbench/workbench.css' },
        { from: 'assets/demo.xlsx' },
        ...['o_spreadsheet.min.iife.js', 'o_spreadsheet.xml', 'o_spreadsheet.css'].map((file) => ({
          from: join(folderOf('@odoo/o-spreadsheet'), 'dist', file),
          to: 'vendor/[name][ext]',
          info: { minimized: true },
        })),
        { from: join(folderOf('bootstrap'), 'dist/css/bootstrap-utilities.min.css'), to: 'vendor/[name][ext]' },
        { from: join(folderOf('@odoo/owl'), 'dist', 'owl.iife.min.js'), to: 'vendor/[name][ext]', info: { minimized: true } },
        ...LICENSED.map((name) => ({
          from: join(ROOT, 'node_modules', name, 'LICENSE'),
          to: `vendor/${name.split('/').at(-1)}-LICENSE.txt`,
          toType: 'file',
        })),
      ],
    }),
  ],
};

/** The worker for cases that are no flow, with the solver beside it: nothing of it is loaded before such a case appears. */
const search = {
  ...common,
  name: 'search',
  target: ['webworker', 'es2022'],
  entry: { search: './src/entries/search.ts' },
  output: { path: join(ROOT, 'dist'), filename: '[name].js' },
  plugins: [
    new CopyPlugin({
      patterns: [
        ...['highs.js', 'highs.wasm'].map((file) => ({
          from: join(ROOT, 'node_modules/highs/build', file),
          to: 'vendor/[name][ext]',
          info: { minimized: true },
        })),
        { from: join(ROOT, 'node_modules/highs/LICENSE'), to: 'vendor/highs-LICENSE.txt', toType: 'file' },
      ],
    }),
  ],
};

export default [excel, workbench, search];
