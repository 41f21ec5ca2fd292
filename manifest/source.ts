/** What both forms of the manifest say of the add-in. */
export const ADD_IN = {
  /** Identifies the XML form; never changes. */
  xmlId: '6f1d3c58-0b7e-4d0a-9a43-5f2f0e6b7c11',
  /** Identifies the unified JSON form, a package of its own that hides the XML form; never changes. */
  jsonId: '0c9a7b64-2d35-4f8e-8e1b-71c4a98f3d02',
  name: 'Dutyproof',
  provider: 'The Dutyproof authors',
  /** At most 80 characters. */
  tagline: 'Who takes which duty, answered and proven in your own spreadsheet.',
  description: 'Who takes which duty, answered in the sheet: plans that cover as much as can be covered, and proof of it.',
  longDescription:
    'Cell functions that turn tables of who may take what, and how much, into a plan that covers as many seats as can be covered, ' +
    'the most urgent first; that name what stays uncovered and why; and that prove that no plan covers more. ' +
    'Everything is computed inside the workbook and nothing leaves it.',
  locale: 'en-GB',
  accentColour: '#1F5A4C',
  /** Shared between the pane and the functions. */
  page: 'pane.html',
  script: 'pane.js',
  metadata: 'functions.json',
  help: 'functions.html',
  iconSizes: [16, 32, 64, 80],
  group: { id: 'Dutyproof.Group', label: 'Dutyproof' },
  button: {
    id: 'Dutyproof.Open',
    action: 'OpenDesk',
    label: 'Duty desk',
    tip: 'Shows the cases in this workbook: what is covered, what is short and why, and what is odd in the tables.',
  },
  requirements: [
    { name: 'SharedRuntime', version: '1.1' },
    { name: 'CustomFunctionsRuntime', version: '1.3' },
  ],
} as const;

/** The same for both: where the pages are, and which version this is. */
export interface Edition {
  /** An https origin or folder, without a slash at the end. */
  readonly origin: string;
  /** Three parts, from package.json; manifests carry a fourth. */
  readonly version: string;
}

/** The address of an icon of so many pixels. */
export function iconUrl({ origin }: Edition, size: number): string {
  return `${origin}/icons/icon-${size}.png`;
}
