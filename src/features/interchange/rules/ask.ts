/** Collects what a file leaves open, each question once however often it arises, and what the user answered. */
import type { Answers, Question } from '../contract';

const MOST_EXAMPLES = 5;

export class Asking {
  readonly #open = new Map<string, { ask: string; choices: readonly string[]; examples: string[] }>();

  constructor(private readonly answers: Answers = {}) {}

  /**
   * Asks once per id.
   * @returns the chosen answer, or null while the question is open.
   */
  ask<T extends string>(id: string, ask: string, choices: readonly T[], example?: string): T | null {
    const answer = this.answers[id];
    const chosen = choices.find((choice) => choice === answer);
    if (chosen !== undefined) return chosen;
    const entry = this.#open.get(id) ?? { ask, choices, examples: [] };
    if (example !== undefined && entry.examples.length < MOST_EXAMPLES) entry.examples.push(example);
    this.#open.set(id, entry);
    return null;
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
