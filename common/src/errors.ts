/** What an engine error tells besides its message; `field` is a path into the input, such as `node.parts[2].states[0].current`. */
export interface EngineErrorDetails {
  /** Machine-readable reason, kebab-case. */
  code: string;
  /** Path of the offending field in the engine's input, dots and brackets; '' for the whole input. */
  field: string;
  /** The value received, where there is one. */
  value?: unknown;
  /** Unit of the value and of the expectation, where they have one. */
  unit?: string;
  /** What is allowed, in words. */
  expected?: string;
  /** Further paths of the same problem, for example the other part of an unmet need. */
  relatedFields?: string[];
  /** Of a part that cannot get from one state to another: which. */
  move?: StateMove;
}

/** A change of state of a part, by their ids. */
export interface StateMove {
  partId: string;
  fromStateId: string;
  toStateId: string;
}

/** Base of everything the engine throws. It knows nothing of HTTP. */
export class EngineError extends Error {
  readonly code: string;
  readonly field: string;
  readonly value: unknown;
  readonly unit: string | undefined;
  readonly expected: string | undefined;
  readonly relatedFields: readonly string[];
  readonly move: StateMove | undefined;

  constructor(message: string, details: EngineErrorDetails, options?: ErrorOptions) {
    super(message, options);
    this.name = new.target.name;
    this.code = details.code;
    this.field = details.field;
    this.value = details.value;
    this.unit = details.unit;
    this.expected = details.expected;
    this.relatedFields = details.relatedFields ?? [];
    this.move = details.move;
  }
}

/** A number lies outside the domain where the formula holds. */
export class OutOfRangeError extends EngineError {}

/** Two inputs contradict each other, or one refers to something that is not there. */
export class InconsistentInputError extends EngineError {}

/** A search ended without meeting its tolerance. */
export class NoConvergenceError extends EngineError {
  readonly iterations: number;
  readonly residual: number;

  constructor(message: string, details: EngineErrorDetails & { iterations: number; residual: number }) {
    super(message, details);
    this.iterations = details.iterations;
    this.residual = details.residual;
  }
}

/** Several engine errors found in one pass, so that a caller can show every problem and not only the first. */
export class EngineErrors extends EngineError {
  readonly errors: readonly EngineError[];

  constructor(errors: readonly [EngineError, ...EngineError[]]) {
    super(errors.map((error) => error.message).join(' '), { code: errors[0].code, field: errors[0].field });
    this.errors = errors;
  }
}
