import { absences, type Absence } from '../cover/absences';
import type { Case } from '../cover/case';
import { fingerprint } from '../cover/fingerprint';
import { remedies, type Remedies } from '../cover/remedies';
import { shortages, type Shortage } from '../cover/shortage';
import { solve, type Solution } from '../cover/solve';
import { usedFeatures } from '../sheet/features';
import { readCase } from '../sheet/readCase';
import type { Range } from '../sheet/range';
import type { Reading } from '../sheet/reading';
import { crossingMessage, Refusal, refusalOf } from './refusal';

/**
 * One case with all that is known of it; equal inputs share one. Everything beyond the reading is
 * worked out when first asked for and then kept.
 */
export class Solved {
  readonly reading: Reading;
  #solution: Solution | Error | null = null;
  #shortages: readonly Shortage[] | null = null;
  #absences: readonly Absence[] | null = null;
  #remedies: Remedies | Error | null = null;
  #fingerprint: string | null = null;

  constructor(ranges: readonly (Range | null)[]) {
    this.reading = readCase(ranges);
  }

  /**
   * The case.
   * @throws InputFault the first one, where the inputs cannot be read
   */
  get case(): Case {
    if (this.reading.case === null) throw this.reading.faults[0];
    return this.reading.case;
  }

  /**
   * The best plan and its flow.
   * @throws InputFault like `case`; Refusal where the case needs what is not built yet
   */
  get solution(): Solution {
    this.#solution ??= this.#solve();
    if (this.#solution instanceof Error) throw this.#solution;
    return this.#solution;
  }

  /**
   * The duties that are short in the best plan, in table order.
   * @throws like `solution`
   */
  get shortages(): readonly Shortage[] {
    this.#shortages ??= shortages(this.case, this.solution);
    return this.#shortages;
  }

  /**
   * What the absence of each person would cost.
   * @throws like `solution`
   */
  get absences(): readonly Absence[] {
    this.#absences ??= absences(this.case, this.solution);
    return this.#absences;
  }

  /**
   * The cheapest remedies.
   * @throws like `solution`; Refusal also where there is too much to look at
   */
  get remedies(): Remedies {
    this.#remedies ??= this.#findRemedies();
    if (this.#remedies instanceof Error) throw this.#remedies;
    return this.#remedies;
  }

  /**
   * A short text that is equal for equal cases, whatever the order of their rows.
   * @throws InputFault like `case`
   */
  get fingerprint(): string {
    this.#fingerprint ??= fingerprint(this.case);
    return this.#fingerprint;
  }

  #findRemedies(): Remedies | Error {
    const kase = this.case;
    const { plan } = this.solution;
    if (plan.covered === plan.needed) return { changes: [], covered: plan.covered, faults: [] };
    const found = remedies(kase);
    if (found === null) {
      return new Refusal('There are more than a million possible pairs of duties and people to look at. Ask about a part of the duties.');
    }
    if ('crossing' in found) return new Refusal(crossingMessage(kase, found));
    return found.faults.length > 0 ? new Refusal(`The remedies could not be proven cheapest: ${found.faults[0]}`) : found;
  }

  #solve(): Solution | Error {
    const kase = this.case;
    const refusal = refusalOf(usedFeatures(kase, this.reading.featureRows));
    if (refusal !== null) return refusal;
    const solution = solve(kase);
    return 'crossing' in solution ? new Refusal(crossingMessage(kase, solution)) : solution;
  }
}
