import type { CellFunction } from '../src/functions/declaration';
import { NAMESPACE } from '../src/functions/registry';
import { makeFunctionsJson } from './functionsJson';
import { ADD_IN, iconUrl, type Edition } from './source';

/** The version of the schema the unified form is written for. */
export const SCHEMA_VERSION = '1.25';

/**
 * The unified manifest: the same add-in for the Excels that know it. It hides the XML form, so that
 * nobody sees the add-in twice.
 */
export function makeJson(functions: readonly CellFunction[], edition: Edition): unknown {
  const { origin, version } = edition;
  const icons = [16, 32, 80].map((size) => ({ size, url: iconUrl(edition, size) }));
  return {
    $schema: `https://developer.microsoft.com/json-schemas/teams/v${SCHEMA_VERSION}/MicrosoftTeams.schema.json`,
    manifestVersion: SCHEMA_VERSION,
    version,
    id: ADD_IN.jsonId,
    developer: {
      name: ADD_IN.provider,
      websiteUrl: `${origin}/${ADD_IN.help}`,
      privacyUrl: `${origin}/${ADD_IN.help}#privacy`,
      termsOfUseUrl: `${origin}/${ADD_IN.help}#licence`,
    },
    name: { short: ADD_IN.name, full: ADD_IN.name },
    description: { short: ADD_IN.tagline, full: ADD_IN.longDescription },
    icons: { color: 'icons/colour.png', outline: 'icons/outline.png' },
    accentColor: ADD_IN.accentColour,
    localizationInfo: { defaultLanguageTag: ADD_IN.locale.toLowerCase(), additionalLanguages: [] },
    authorization: {
      permissions: { resourceSpecific: [{ name: 'Document.ReadWrite.User', type: 'Delegated' }] },
    },
    validDomains: [new URL(origin).host],
    extensions: [
      {
        requirements: { scopes: ['workbook'] },
        runtimes: [
          {
            requirements: {
              capabilities: ADD_IN.requirements.map(({ name, version: minVersion }) => ({ name, minVersion })),
            },
            id: 'SharedRuntime',
            type: 'general',
            code: { page: `${origin}/${ADD_IN.page}` },
            lifetime: 'long',
            actions: [{ id: ADD_IN.button.action, type: 'openPage', view: 'desk' }],
            customFunctions: {
              namespace: { id: NAMESPACE, name: NAMESPACE },
              ...withoutErrorFlag(makeFunctionsJson(functions, edition)),
            },
          },
        ],
        ribbons: [
          {
            contexts: ['default'],
            tabs: [
              {
                builtInTabId: 'TabHome',
                groups: [
                  {
                    id: ADD_IN.group.id,
                    label: ADD_IN.group.label,
                    icons,
                    controls: [
                      {
                        id: ADD_IN.button.id,
                        type: 'button',
                        label: ADD_IN.button.label,
                        icons,
                        supertip: { title: ADD_IN.button.label, description: ADD_IN.button.tip },
                        actionId: ADD_IN.button.action,
                      },
                    ],
                  },
                ],
              },
            ],
          },
        ],
        alternates: [{ hide: { customOfficeAddin: { officeAddinId: ADD_IN.xmlId } } }],
      },
    ],
  };
}

/** The functions as the schema of the unified form spells them: options beside the name, no flag for errors. */
function withoutErrorFlag({ allowCustomDataForDataTypeAny, functions }: ReturnType<typeof makeFunctionsJson>): object {
  return {
    allowCustomDataForDataTypeAny,
    functions: functions.map(({ options, ...rest }) => ({ ...rest, ...options })),
  };
}
