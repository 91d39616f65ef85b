/** Collects what a file leaves open, each question once however often it arises, and what the user answered. */
import type { Answers, Offer, Question } from '../contract';

const MOST_EXAMPLES = 5;

export class Asking {
  readonly #open = new Map<string, { ask: string; choices: readonly string[]; examples: string[] }>();
  readonly #settled = new Map<string, Offer>();

  constructor(private readonly answers: Answers = {}) {}

  /**
   * Asks once per id.
   * @returns the chosen answer, or null while the question is open.
   */
  ask<T extends string>(id: string, ask: string, choices: readonly T[], example?: string): T | null {
    const answer = this.answers[id];
    const chosen = choices.find((choice) => choice === answer);
    if (chosen !== undefined) {
      this.#settled.set(id, { id, ask, choices: [...choices], chosen });
      return chosen;
    }
    const entry = this.#open.get(id) ?? { ask, choices, examples: [] };
    if (example !== undefined && entry.examples.length < MOST_EXAMPLES) entry.examples.push(example);
    this.#open.set(id, entry);
    return null;
  }

  /** Another reading that may be wanted and holds nothing back: the first choice unless told otherwise. */
  offer<T extends string>(id: string, ask: string, choices: readonly [T, ...T[]]): T {
    const chosen = choices.find((choice) => choice === this.answers[id]) ?? choices[0];
    this.#settled.set(id, { id, ask, choices: [...choices], chosen });
    return chosen;
  }

  /** Questions already answered and offers, each with the choice that this reading used. */
  settled(): Offer[] {
    return [...this.#settled.values()];
  }

  questions(): Question[] {
    return [...this.#open].map(([id, entry]) => ({
      id,
      ask: entry.ask,
      choices: [...entry.choices],
      examples: entry.examples,
    }));
  }
}
