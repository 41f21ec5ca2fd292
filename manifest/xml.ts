import { NAMESPACE } from '../src/functions/registry';
import { ADD_IN, iconUrl, type Edition } from './source';

/** An element: its name, attributes, and children or text, written out by `render`. */
interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly Element[] | string;
}

function element(name: string, attributes: Record<string, string> = {}, children: readonly Element[] | string = []): Element {
  return { name, attributes, children };
}

function value(name: string, text: string): Element {
  return element(name, { DefaultValue: text });
}

/** The add-in-only manifest: the product, understood by every Excel that has shared runtimes. */
export function makeXml(edition: Edition): string {
  const { origin, version } = edition;
  const root = element(
    'OfficeApp',
    {
      xmlns: 'http://schemas.microsoft.com/office/appforoffice/1.1',
      'xmlns:xsi': 'http://www.w3.org/2001/XMLSchema-instance',
      'xmlns:bt': 'http://schemas.microsoft.com/office/officeappbasictypes/1.0',
      'xsi:type': 'TaskPaneApp',
    },
    [
      element('Id', {}, ADD_IN.xmlId),
      element('Version', {}, `${version}.0`),
      element('ProviderName', {}, ADD_IN.provider),
      element('DefaultLocale', {}, ADD_IN.locale),
      value('DisplayName', ADD_IN.name),
      value('Description', ADD_IN.description),
      value('IconUrl', iconUrl(edition, 32)),
      value('HighResolutionIconUrl', iconUrl(edition, 64)),
      value('SupportUrl', `${origin}/${ADD_IN.help}`),
      element('Hosts', {}, [element('Host', { Name: 'Workbook' })]),
      element('Requirements', {}, [
        element(
          'Sets',
          { DefaultMinVersion: '1.1' },
          ADD_IN.requirements.map(({ name, version: least }) => element('Set', { Name: name, MinVersion: least })),
        ),
      ]),
      element('DefaultSettings', {}, [value('SourceLocation', `${origin}/${ADD_IN.page}`)]),
      element('Permissions', {}, 'ReadWriteDocument'),
      overrides(edition),
    ],
  );
  return `<?xml version="1.0" encoding="UTF-8"?>\n${render(root, 0)}`;
}

function overrides(edition: Edition): Element {
  return element(
    'VersionOverrides',
    { xmlns: 'http://schemas.microsoft.com/office/taskpaneappversionoverrides', 'xsi:type': 'VersionOverridesV1_0' },
    [
      element('Hosts', {}, [
        element('Host', { 'xsi:type': 'Workbook' }, [
          element('Runtimes', {}, [element('Runtime', { resid: 'Page.Url', lifetime: 'long' })]),
          element('AllFormFactors', {}, [customFunctions()]),
          element('DesktopFormFactor', {}, [element('FunctionFile', { resid: 'Page.Url' }), ribbon()]),
        ]),
      ]),
      resources(edition),
    ],
  );
}

function customFunctions(): Element {
  const at = (name: string, resid: string): Element => element(name, {}, [element('SourceLocation', { resid })]);
  return element('ExtensionPoint', { 'xsi:type': 'CustomFunctions' }, [
    at('Script', 'Script.Url'),
    at('Page', 'Page.Url'),
    at('Metadata', 'Metadata.Url'),
    element('Namespace', { resid: 'Functions.Namespace' }),
  ]);
}

function ribbon(): Element {
  const icon = element('Icon', {}, [16, 32, 80].map((size) => element('bt:Image', { size: String(size), resid: `Icon.${size}` })));
  const button = element('Control', { 'xsi:type': 'Button', id: ADD_IN.button.id }, [
    element('Label', { resid: 'Button.Label' }),
    element('Supertip', {}, [element('Title', { resid: 'Button.Label' }), element('Description', { resid: 'Button.Tip' })]),
    icon,
    element('Action', { 'xsi:type': 'ShowTaskpane' }, [element('SourceLocation', { resid: 'Page.Url' })]),
  ]);
  return element('ExtensionPoint', { 'xsi:type': 'PrimaryCommandSurface' }, [
    element('OfficeTab', { id: 'TabHome' }, [
      element('Group', { id: ADD_IN.group.id }, [element('Label', { resid: 'Group.Label' }), icon, button]),
    ]),
  ]);
}

function resources(edition: Edition): Element {
  const { origin } = edition;
  const entry = (kind: string, id: string, text: string): Element => element(`bt:${kind}`, { id, DefaultValue: text });
  return element('Resources', {}, [
    element('bt:Images', {}, [16, 32, 80].map((size) => entry('Image', `Icon.${size}`, iconUrl(edition, size)))),
    element('bt:Urls', {}, [
      entry('Url', 'Page.Url', `${origin}/${ADD_IN.page}`),
      entry('Url', 'Script.Url', `${origin}/${ADD_IN.script}`),
      entry('Url', 'Metadata.Url', `${origin}/${ADD_IN.metadata}`),
    ]),
    element('bt:ShortStrings', {}, [
      entry('String', 'Functions.Namespace', NAMESPACE),
      entry('String', 'Group.Label', ADD_IN.group.label),
      entry('String', 'Button.Label', ADD_IN.button.label),
    ]),
    element('bt:LongStrings', {}, [entry('String', 'Button.Tip', ADD_IN.button.tip)]),
  ]);
}

function render({ name, attributes, children }: Element, depth: number): string {
  const indent = '  '.repeat(depth);
  const open = `${indent}<${name}${Object.entries(attributes).map(([key, text]) => ` ${key}="${escape(text)}"`).join('')}`;
  if (typeof children === 'string') return `${open}>${escape(children)}</${name}>\n`;
  if (children.length === 0) return `${open}/>\n`;
  return `${open}>\n${children.map((child) => render(child, depth + 1)).join('')}${indent}</${name}>\n`;
}

function escape(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
