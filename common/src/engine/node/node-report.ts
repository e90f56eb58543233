import { EngineErrors, InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import type { EngineError, StateMove } from '#common/errors.ts';
import type { NodeRemark } from './node-program.types.ts';

/** Collects the errors and remarks of one pass over a node. */
export class NodeReport {
  readonly remarks: NodeRemark[] = [];
  private readonly errors: EngineError[] = [];
  private readonly remarked = new Set<string>();

  /** Notes an error that was thrown elsewhere. */
  add(error: EngineError): void {
    if (error instanceof EngineErrors) this.errors.push(...error.errors);
    else this.errors.push(error);
  }

  inconsistent(
    code: string,
    field: string,
    message: string,
    details: { value?: unknown; expected?: string; move?: StateMove } = {},
  ): void {
    this.errors.push(new InconsistentInputError(message, { code, field, ...details }));
  }

  /** Notes a number that is not finite or outside its range. */
  number(value: number, field: string, unit: string, { min = 0, max = Infinity, isAbove = false } = {}): void {
    if (Number.isFinite(value) && value <= max && (isAbove ? value > min : value >= min)) return;
    const least = isAbove ? `above ${min}` : `${min} or more`;
    const expected = `${max === Infinity ? least : `${min} to ${max}`}${unit === '' ? '' : ` ${unit}`}`;
    const message = `${field} is ${value}; allowed is ${expected}.`;
    this.errors.push(new OutOfRangeError(message, { code: 'out-of-range', field, value, unit, expected }));
  }

  /** Notes a remark once. */
  remark(remark: NodeRemark): void {
    const key = `${remark.code} ${remark.path} ${remark.message}`;
    if (this.remarked.has(key)) return;
    this.remarked.add(key);
    this.remarks.push(remark);
  }

  /** Number of errors so far. */
  get errorCount(): number {
    return this.errors.length;
  }

  /** Throws what was collected, if anything. */
  throwErrors(): void {
    const [first, ...rest] = this.errors;
    if (first) throw new EngineErrors([first, ...rest]);
  }
}
