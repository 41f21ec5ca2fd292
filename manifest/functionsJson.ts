import type { CellFunction } from '../src/functions/declaration';
import { ADD_IN, type Edition } from './source';

/** One entry of functions.json, as Excel reads it. */
export interface FunctionMetadata {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  readonly helpUrl: string;
  readonly options: { readonly requiresAddress: true };
  readonly parameters: readonly {
    readonly name: string;
    readonly description: string;
    readonly type: 'any';
    readonly dimensionality: 'matrix';
    readonly optional?: true;
  }[];
  /** Of any type, which is what leaving the type out means. */
  readonly result: { readonly dimensionality: 'matrix' };
}

/** The whole of functions.json. */
export interface FunctionsJson {
  /** Cells with data types arrive whole. */
  readonly allowCustomDataForDataTypeAny: true;
  /** Without this, one error cell in a range keeps the function from running at all. */
  readonly allowErrorForDataTypeAny: true;
  readonly functions: readonly FunctionMetadata[];
}

/** functions.json from the declarations of the functions. */
export function makeFunctionsJson(functions: readonly CellFunction[], { origin }: Edition): FunctionsJson {
  return {
    allowCustomDataForDataTypeAny: true,
    allowErrorForDataTypeAny: true,
    functions: functions.map(({ id, summary, parameters }) => ({
      id,
      name: id,
      description: summary,
      helpUrl: `${origin}/${ADD_IN.help}#${id.toLowerCase()}`,
      options: { requiresAddress: true },
      parameters: parameters.map(({ name, description, optional }) => ({
        name,
        description,
        type: 'any',
        dimensionality: 'matrix',
        ...(optional ? { optional: true as const } : {}),
      })),
      result: { dimensionality: 'matrix' },
    })),
  };
}
