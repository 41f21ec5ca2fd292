import { InputFault } from '../sheet/fault';
import type { Range } from '../sheet/range';
import type { CellFunction } from './declaration';
import type { Answer, Journal } from './journal';
import { recall } from './memory';
import { Refusal } from './refusal';
import { Busy, dropSearchesBut } from './searches';
import type { Solved } from './solved';

/**
 * Runs a cell function for a host and notes the answer. Never throws: whatever goes wrong becomes
 * the message of a #VALUE! error.
 *
 * @param ranges one entry a parameter, in order; null where it was left out
 * @param address the calling cell as `Sheet!B4`, or '' where the host does not tell
 */
export function invoke(
  fn: CellFunction,
  ranges: readonly (Range | null)[],
  address: string,
  journal: Journal,
): Answer {
  let solved: Solved | null = null;
  let waitsFor: Solved | null = null;
  let answer: Answer;
  try {
    if ('ofCase' in fn) {
      solved = recall(ranges);
      answer = { kind: 'spill', spill: fn.ofCase(solved) };
    } else {
      answer = { kind: 'spill', spill: fn.ofRanges(ranges) };
    }
  } catch (error) {
    if (error instanceof Busy) {
      waitsFor = error.solved;
      answer = { kind: 'busy', settled: error.settled };
    } else {
      answer = { kind: 'fault', message: messageOf(error, fn) };
    }
  }
  journal.record({ address, functionId: fn.id, answer, solved, waitsFor });
  dropUnasked(journal);
  return answer;
}

/** A case that no cell asks about any more is not searched any longer. */
function dropUnasked(journal: Journal): void {
  dropSearchesBut((one) => journal.calls().some(({ solved, waitsFor }) => solved === one || waitsFor === one));
}

function messageOf(error: unknown, fn: CellFunction): string {
  if (error instanceof InputFault || error instanceof Refusal) return error.message;
  const detail = error instanceof Error ? error.message : String(error);
  return `DUTY.${fn.id} failed through an error of its own (${detail}). Please report it.`;
}
