import type { Engine, EngineModel } from './engine';

/** A command of the engine with what it takes. */
export interface BulkStep {
  readonly command: string;
  readonly payload: object;
}

const BULK = 'DUTYPROOF_BULK';

/**
 * Teaches the engine to take many commands as one: it calculates once, and one step of undo takes
 * them all back. To be called before a model is made.
 */
export function registerBulk({ UIPlugin, registries: { featurePluginRegistry } }: Engine): void {
  class Bulk extends UIPlugin {
    handle(command: { readonly type: string; readonly steps?: readonly BulkStep[] }): void {
      if (command.type !== BULK) return;
      for (const { command: name, payload } of command.steps ?? []) this.dispatch(name, payload);
    }
  }
  featurePluginRegistry.replace('dutyproof_bulk', Bulk);
}

/** Carries commands out as one. */
export function runBulk(model: EngineModel, steps: readonly BulkStep[]): void {
  model.dispatch(BULK, { steps });
}
