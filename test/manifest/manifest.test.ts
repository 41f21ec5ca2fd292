import Ajv from 'ajv-draft-04';
import { XMLParser } from 'fast-xml-parser';
import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { validateManifest } from 'office-addin-manifest';
import { describe, expect, it } from 'vitest';
import { makeFunctionsJson } from '../../manifest/functionsJson';
import { makeJson, SCHEMA_VERSION } from '../../manifest/json';
import { ADD_IN } from '../../manifest/source';
import { makeXml } from '../../manifest/xml';
import { FUNCTIONS, NAMESPACE } from '../../src/functions/registry';

const EDITION = { origin: 'https://duty.example', version: '1.2.3' };
const ROOT = join(import.meta.dirname, '../..');
const require = createRequire(import.meta.url);

/** An element as the parser gives it with the order kept. */
interface Node {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly Node[];
  readonly text: string;
}

function parse(xml: string): Node {
  const parser = new XMLParser({ preserveOrder: true, ignoreAttributes: false, attributeNamePrefix: '' });
  const toNode = (raw: Record<string, unknown>): Node => {
    const name = Object.keys(raw).find((key) => key !== ':@')!;
    const inner = raw[name] as Record<string, unknown>[];
    return {
      name,
      attributes: (raw[':@'] ?? {}) as Record<string, string>,
      children: inner.filter((child) => !('#text' in child)).map(toNode),
      text: inner.map((child) => ('#text' in child ? String(child['#text']) : '')).join(''),
    };
  };
  const [root] = (parser.parse(xml) as Record<string, unknown>[]).filter((raw) => !('?xml' in raw)).map(toNode);
  return root;
}

function all(node: Node, name: string): Node[] {
  return [...(node.name === name ? [node] : []), ...node.children.flatMap((child) => all(child, name))];
}

/** The order that the vendor's schema prescribes for the children of each element we use. */
const ORDER: Readonly<Record<string, readonly string[]>> = {
  OfficeApp: (
    'Id Version ProviderName DefaultLocale DisplayName Description IconUrl HighResolutionIconUrl SupportUrl AppDomains Hosts ' +
    'Requirements DefaultSettings Permissions VersionOverrides'
  ).split(' '),
  VersionOverrides: ['Description', 'Requirements', 'Hosts', 'Resources'],
  Host: ['Runtimes', 'AllFormFactors', 'DesktopFormFactor'],
  DesktopFormFactor: ['GetStarted', 'FunctionFile', 'ExtensionPoint'],
  Group: ['Label', 'Icon', 'Control'],
  Control: ['Label', 'Supertip', 'Icon', 'Action'],
  Supertip: ['Title', 'Description'],
  Resources: ['bt:Images', 'bt:Urls', 'bt:ShortStrings', 'bt:LongStrings'],
  ExtensionPoint: ['Script', 'Page', 'Metadata', 'Namespace', 'OfficeTab'],
};

describe('the XML manifest', () => {
  const root = parse(makeXml(EDITION));
  const nodes = (function flatten(node: Node): Node[] {
    return [node, ...node.children.flatMap(flatten)];
  })(root);
  const defined = new Map(
    ['bt:Image', 'bt:Url', 'bt:String'].flatMap((kind) =>
      all(all(root, 'Resources')[0], kind).map(({ attributes }) => [attributes.id, attributes.DefaultValue] as const),
    ),
  );

  it('keeps the order of elements that the schema prescribes', () => {
    for (const { name, children } of nodes) {
      const order = ORDER[name];
      if (order === undefined) continue;
      const places = children.map((child) => order.indexOf(child.name));
      expect(places, name).not.toContain(-1);
      expect(places, name).toEqual([...places].sort((a, b) => a - b));
    }
  });

  it('resolves every resid, leaves none unused, and keeps the lengths', () => {
    const used = nodes.flatMap(({ attributes }) => (attributes.resid === undefined ? [] : [attributes.resid]));
    expect(new Set(used)).toEqual(new Set(defined.keys()));
    for (const id of defined.keys()) expect(id.length).toBeLessThanOrEqual(32);
    for (const { attributes } of all(all(root, 'bt:ShortStrings')[0], 'bt:String')) {
      expect(attributes.DefaultValue.length).toBeLessThanOrEqual(125);
    }
    for (const { attributes } of all(all(root, 'bt:LongStrings')[0], 'bt:String')) {
      expect(attributes.DefaultValue.length).toBeLessThanOrEqual(250);
    }
    expect(all(root, 'Description')[0].attributes.DefaultValue.length).toBeLessThanOrEqual(250);
    expect(all(root, 'DisplayName')[0].attributes.DefaultValue.length).toBeLessThanOrEqual(125);
  });

  it('has one page for the shared runtime, the functions, the button and the start', () => {
    const page = `${EDITION.origin}/${ADD_IN.page}`;
    const [runtime] = all(root, 'Runtime');
    expect(defined.get(runtime.attributes.resid)).toBe(page);
    expect(runtime.attributes.lifetime).toBe('long');
    for (const name of ['Page', 'Action']) {
      expect(defined.get(all(all(root, name)[0], 'SourceLocation')[0].attributes.resid)).toBe(page);
    }
    expect(defined.get(all(root, 'FunctionFile')[0].attributes.resid)).toBe(page);
    expect(all(root, 'DefaultSettings')[0].children[0].attributes.DefaultValue).toBe(page);
    expect(all(root, 'TaskpaneId')).toEqual([]);
    expect(all(root, 'AppDomains')).toEqual([]);
  });

  it('asks for the requirement sets it needs and names its namespace', () => {
    expect(all(root, 'Set').map(({ attributes }) => `${attributes.Name} ${attributes.MinVersion}`)).toEqual([
      'SharedRuntime 1.1',
      'CustomFunctionsRuntime 1.3',
    ]);
    expect(defined.get(all(root, 'Namespace')[0].attributes.resid)).toBe(NAMESPACE);
    expect(all(root, 'Version')[0].text).toBe('1.2.3.0');
  });

  it('names only https addresses, each with its file', () => {
    const addresses = nodes.flatMap(({ attributes: { DefaultValue: text } }) => (/^\w+:\/\//u.test(text ?? '') ? [text] : []));
    expect(addresses.length).toBeGreaterThan(6);
    for (const address of addresses) {
      expect(address.startsWith(`${EDITION.origin}/`)).toBe(true);
      const file = address.slice(EDITION.origin.length + 1);
      const built = ['pane.html', 'pane.js', 'functions.json', 'functions.html'];
      expect(built.includes(file) || existsSync(join(ROOT, 'assets', file)), file).toBe(true);
    }
  });
});

describe('the icons', () => {
  it.each(ADD_IN.iconSizes)('of %i pixels are so large', (size) => {
    const png = readFileSync(join(ROOT, `assets/icons/icon-${size}.png`));
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([size, size]);
  });
});

describe('functions.json', () => {
  it('is what the official generator makes of the same functions, and lets error cells through', () => {
    const comment = (id: string, summary: string, parameters: readonly { name: string; description: string; optional: boolean }[]) =>
      [
        '/**',
        ` * ${summary}`,
        ` * @customfunction ${id}`,
        ` * @helpurl ${EDITION.origin}/${ADD_IN.help}#${id.toLowerCase()}`,
        ...parameters.map(({ name, description, optional }) => ` * @param {any[][]} ${optional ? `[${name}]` : name} ${description}`),
        ' * @param {CustomFunctions.Invocation} invocation',
        ' * @requiresAddress',
        ' * @returns {any[][]} table',
        ' */',
      ].join('\n');
    const source = FUNCTIONS.map(({ id, summary, parameters }) => {
      const list = parameters.map(({ name, optional }) => `${name}${optional ? '?' : ''}: any[][]`).join(', ');
      const last = parameters.some(({ optional }) => optional) ? 'invocation?' : 'invocation';
      return `${comment(id, summary, parameters)}\nfunction ${id.toLowerCase()}(${list}, ${last}: CustomFunctions.Invocation): any[][] { return []; }`;
    }).join('\n\n');
    const folder = mkdtempSync(join(tmpdir(), 'dutyproof-'));
    writeFileSync(join(folder, 'functions.ts'), source);
    const script =
      "const { generateCustomFunctionsMetadata: make } = require('custom-functions-metadata');" +
      'make(process.argv[1]).then((made) => console.log(JSON.stringify(made)));';
    const printed = execFileSync(process.execPath, ['-e', script, join(folder, 'functions.ts')], { cwd: ROOT, encoding: 'utf8' });
    const made = JSON.parse(printed) as { errors: string[]; metadataJson: string };
    expect(made.errors).toEqual([]);
    const official: unknown = JSON.parse(made.metadataJson);
    const { allowErrorForDataTypeAny, ...ours } = makeFunctionsJson(FUNCTIONS, EDITION);
    expect(allowErrorForDataTypeAny).toBe(true);
    expect(ours).toEqual(official);
  });
});

describe('the unified manifest', () => {
  const manifest = makeJson(FUNCTIONS, EDITION) as {
    extensions: {
      runtimes: { actions: { id: string }[]; customFunctions: unknown }[];
      ribbons: { tabs: { groups: { controls: { actionId: string }[] }[] }[] }[];
      alternates: { hide: { customOfficeAddin: { officeAddinId: string } } }[];
    }[];
  };

  it('is valid by the vendor’s tool', async () => {
    const file = join(mkdtempSync(join(tmpdir(), 'dutyproof-')), 'manifest.json');
    writeFileSync(file, JSON.stringify(manifest));
    const { isValid, report } = await validateManifest(file);
    expect(report?.errors ?? []).toEqual([]);
    expect(isValid).toBe(true);
  });

  it('is valid by the schema of its version, functions included', () => {
    const folder = join(require.resolve('@microsoft/app-manifest/package.json'), '../build/json-schemas/teams');
    const schema = JSON.parse(readFileSync(join(folder, `v${SCHEMA_VERSION}/MicrosoftTeams.schema.json`), 'utf8')) as object;
    const ajv = new Ajv({ strict: false, validateFormats: false });
    const validate = ajv.compile(schema);
    validate(manifest);
    expect(validate.errors ?? []).toEqual([]);
  });

  it('ties every button to an action and hides the XML form', () => {
    const [extension] = manifest.extensions;
    const actions = extension.runtimes.flatMap((runtime) => runtime.actions.map(({ id }) => id));
    const wanted = extension.ribbons.flatMap(({ tabs }) =>
      tabs.flatMap(({ groups }) => groups.flatMap(({ controls }) => controls.map(({ actionId }) => actionId))),
    );
    expect(actions).toEqual(wanted);
    expect(extension.alternates[0].hide.customOfficeAddin.officeAddinId).toBe(ADD_IN.xmlId);
  });
});
