import type { Engine, EngineModel } from './engine';

const BULK = 'DUTYPROOF_BULK';

/**
 * Teaches the engine to take many commands as one: it calculates once, and one step of undo takes
 * them all back. To be called before a model is made.
 */
export function registerBulk({ UIPlugin, registries: { featurePluginRegistry } }: Engine): void {
  class Bulk extends UIPlugin {
    handle(command: { readonly type: string; readonly run?: () => void }): void {
      // What is dispatched while a command is under way belongs to it.
      if (command.type === BULK) command.run?.();
    }
  }
  featurePluginRegistry.replace('dutyproof_bulk', Bulk);
}

/** Carries out as one whatever the function dispatches. */
export function runBulk(model: EngineModel, run: () => void): void {
  model.dispatch(BULK, { run });
}
