import type { SheetDraft } from '../port';
import type { EngineModel } from './engine';

/** What may be typed into ranges, as the engine keeps it. */
export interface EngineCheck {
  readonly id: string;
  readonly ranges: readonly string[];
  /** True where anything else is refused, not only marked. */
  readonly isBlocking: boolean;
  readonly criterion: {
    readonly type: string;
    /** Values as typed; formulas with their equals sign. */
    readonly values: readonly string[];
    readonly dateValue?: 'exactDate';
    readonly displayStyle?: 'arrow';
  };
  /** The same as a file words it: the engine keeps it, and does not look at it. */
  readonly file?: object;
}

/** Lets only whole numbers from `least` on be typed into a column; anything else is marked, not refused. */
export function addWholes(
  model: EngineModel,
  sheetId: string,
  { column, from, least }: NonNullable<SheetDraft['wholes']>[number],
  lastRow: number,
): void {
  const range = model.getters.getRangeDataFromZone(sheetId, { top: from, bottom: lastRow, left: column, right: column });
  const rule: Omit<EngineCheck, 'ranges'> = {
    id: crypto.randomUUID(),
    isBlocking: false,
    criterion: { type: 'isGreaterOrEqualTo', values: [String(least)] },
    file: {
      type: 'whole',
      operator: 'greaterThanOrEqual',
      formula1: String(least),
      allowBlank: true,
      showErrorMessage: true,
      errorStyle: 'warning',
      errorMessage: `A whole number of at least ${least} is expected here.`,
    },
  };
  model.dispatch('ADD_DATA_VALIDATION_RULE', { sheetId, ranges: [range], rule });
}
