/**
 * The kernel's errors are data: a permanent name, a title, the quantity and value read, and what to do. A
 * surface maps `name` to its own status and shows `title`, `message` and `hint`.
 */
export const KERNEL_ERRORS = {
  UnknownBlock: {
    title: 'Unknown block',
    hint: 'Check the code against the list of blocks, or add the block.',
  },
  NegativeAge: {
    title: 'Age below zero',
    hint: 'Ages are in Ma and count backwards from the present: give 0 or more.',
  },
  NonFinite: { title: 'Not a number', hint: 'Give a finite number.' },
  OutOfRange: { title: 'Value out of range', hint: 'Give a value within the stated range.' },
  CircuitCycle: {
    title: 'Circuit runs in a loop',
    hint: 'Change the reference of one block of the loop at these ages.',
  },
} as const;

export type KernelErrorName = keyof typeof KERNEL_ERRORS;

interface KernelErrorFacts {
  /** What was asked for, in the words of the request, e.g. `age_ma`. */
  readonly quantity: string;
  readonly value: unknown;
  /** What is wrong, as a clause that follows the value. */
  readonly problem: string;
  /** The blocks of a circuit that bites its own tail, the first not repeated. */
  readonly loop?: readonly string[];
}

export class KernelError extends Error {
  override readonly name: KernelErrorName;
  readonly title: string;
  readonly hint: string;
  readonly quantity: string;
  readonly value: unknown;
  readonly problem: string;
  readonly loop: readonly string[] | null;

  constructor(name: KernelErrorName, { quantity, value, problem, loop }: KernelErrorFacts) {
    super(`${quantity} ${String(value)}: ${problem}`);
    this.name = name;
    this.title = KERNEL_ERRORS[name].title;
    this.hint = KERNEL_ERRORS[name].hint;
    this.quantity = quantity;
    this.value = value;
    this.problem = problem;
    this.loop = loop ?? null;
  }
}

/** An error of the kernel as plain data, to travel between threads. Inverse: {@link fromRefusal}. */
export interface KernelRefusal extends KernelErrorFacts {
  readonly name: KernelErrorName;
}

export const refusalOf = ({ name, quantity, value, problem, loop }: KernelError): KernelRefusal => ({
  ...{ name, quantity, value, problem },
  ...(loop ? { loop } : {}),
});

export const fromRefusal = ({ name, ...facts }: KernelRefusal): KernelError => new KernelError(name, facts);

/** @throws {KernelError} `NonFinite` for NaN and ±∞. */
export function requireFinite(quantity: string, value: number): number {
  if (!Number.isFinite(value))
    throw new KernelError('NonFinite', { quantity, value, problem: 'not a finite number' });
  return value;
}

/** @throws {KernelError} `NonFinite`, or `NegativeAge` below 0. */
export function requireAge(quantity: string, value: number): number {
  requireFinite(quantity, value);
  if (value < 0)
    throw new KernelError('NegativeAge', { quantity, value, problem: 'an age is never below 0 Ma' });
  return value;
}
